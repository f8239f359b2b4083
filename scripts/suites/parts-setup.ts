import { startTestStack } from "./test-stack.ts";

/** For vitest's `globalSetup`: database, store and mail for tests that need no server. */
export default async function setup(): Promise<() => Promise<void>> {
  const stack = await startTestStack({ server: false });
  return () => stack.stop();
}
