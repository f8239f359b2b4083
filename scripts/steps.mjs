/** Says what is being done and how long it took, one line a step. */

/** Where steps are told; a command whose answer is on standard output tells them beside it. */
let out = process.stdout;

export function tellStepsOnStandardError() {
  out = process.stderr;
}

/** Runs `work` as one step. On failure the line says so and the error goes on. */
export async function step(title, work) {
  const started = Date.now();
  if (out.isTTY) out.write(`  … ${title}`);
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
  out.write(out.isTTY ? `\r\u001b[K${text}\n` : `${text}\n`);
}
