import { startTestStack } from "./test-stack.ts";

/** For vitest's `globalSetup`: the whole product, unless SWALE_URL says that one runs already. */
export default async function setup(): Promise<(() => Promise<void>) | undefined> {
  if (process.env.SWALE_URL) return undefined;
  const stack = await startTestStack({});
  return () => stack.stop();
}
