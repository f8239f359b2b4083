import { askApi } from "./browser.ts";

/** What the API says of a run once it is no longer under way; the test's own time limit ends the waiting. */
export async function whenEnded(path: string, token: string): Promise<Record<string, unknown>> {
  for (;;) {
    const answer = await (await askApi(path, token)).json();
    if (!UNDER_WAY.includes(answer.state ?? answer.phase)) return answer;
    await new Promise((resolve) => setTimeout(resolve, LOOK_EVERY_MS));
  }
}

const UNDER_WAY = ["waiting", "running", "checking", "taking"];
const LOOK_EVERY_MS = 100;
