import { analyseCommand } from "./analyse/command.ts";

/** `npm run analyse -- FILE… [options]`. */
process.exitCode = await analyseCommand(process.argv.slice(2), {
  out: (text) => void process.stdout.write(text),
  err: (text) => void process.stderr.write(text),
});
