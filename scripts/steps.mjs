/** Says what is being done and how long it took, one line a step. */

const INTERACTIVE = process.stdout.isTTY === true;

/** Runs `work` as one step. On failure the line says so and the error goes on. */
export async function step(title, work) {
  const started = Date.now();
  if (INTERACTIVE) process.stdout.write(`  … ${title}`);
  try {
    const note = await work();
    line("✓", title, started, typeof note === "string" ? note : "");
    return note;
  } catch (error) {
    line("✗", title, started, "");
    throw error;
  }
}

/** An error whose message is all that a person needs: no stack is shown. */
export class PlainFailure extends Error {}

/** Prints a failure the way every command here does, and sets the exit code. */
export function reportFailure(error) {
  const plain = error instanceof PlainFailure || error?.name === "PlainFailure";
  console.error(plain ? `\n${error.message}` : error);
  process.exitCode = 1;
}

function line(mark, title, started, note) {
  const seconds = ((Date.now() - started) / 1000).toFixed(1);
  const text = `  ${mark} ${title.padEnd(46)} ${seconds.padStart(6)} s${note ? `  ${note}` : ""}`;
  process.stdout.write(INTERACTIVE ? `\r\u001b[K${text}\n` : `${text}\n`);
}
