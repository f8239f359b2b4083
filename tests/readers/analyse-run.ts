import { spawnSync } from "node:child_process";
import { fileURLToPath } from "node:url";
import { analyseCommand } from "../../scripts/analyse/command.ts";

/** What a run of the command `analyse` left. */
interface Run {
  code: number | null;
  out: string;
  err: string;
}

/** Runs the command's function here: what it writes and ends with, without a process start. */
export async function runHere(...args: string[]): Promise<Run> {
  const run = { out: "", err: "" };
  const code = await analyseCommand(args, {
    out: (text) => {
      run.out += text;
    },
    err: (text) => {
      run.err += text;
    },
  });
  return { code, ...run };
}

/** The same as a process of its own. */
export function runApart(...args: string[]): Run {
  const run = spawnSync(process.execPath, ["--import", "tsx", "scripts/analyse.ts", ...args], {
    cwd: fileURLToPath(new URL("../..", import.meta.url)),
    encoding: "utf8",
  });
  return { code: run.status, out: run.stdout, err: run.stderr };
}

/** Its answers, one a line. */
export function rowsOf({ out }: Run) {
  return out
    .trim()
    .split("\n")
    .map((line) => JSON.parse(line));
}
