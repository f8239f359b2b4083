import { startTestStack } from "./suites/test-stack.ts";

/** Prints what becomes of a mail whose server goes wrong: `node scripts/run.mjs mail-trials.ts`. */
const stack = await startTestStack({ server: false });
try {
  const { MAIL_TRIALS, tryMail } = await import("./trials/mail.ts");
  const { pool } = await import("~/db/client.server");
  const line = (cells: (string | number)[]) =>
    console.log(
      `${String(cells[0]).padEnd(40)}${cells
        .slice(1, -1)
        .map((cell) => String(cell).padEnd(10))
        .join("")}${cells.at(-1)}`,
    );
  line(["the server", "promise", "attempts", "taken", "ids", "state", "last reason"]);
  for (const trial of MAIL_TRIALS) {
    const { name, attempts, taken, messageIds, state, reason } = await tryMail(trial);
    line([name, trial.promise, attempts, taken, messageIds, state, reason]);
  }
  await pool.end();
} finally {
  await stack.stop();
}
