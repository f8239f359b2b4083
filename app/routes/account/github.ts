import { beginGithub } from "~/services/github-sign-in.server";
import type { Route } from "./+types/github";

/** Sends the browser to the provider. */
export async function loader({ request }: Route.LoaderArgs) {
  return beginGithub(new URL(request.url).searchParams.get("next"));
}
