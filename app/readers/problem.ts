import type { ReadProblem } from "./reading.ts";

/** Thrown inside the readers only; `read` turns it into a result. */
export class ReadFailure extends Error {
  readonly problem: ReadProblem;

  constructor(problem: ReadProblem) {
    super(problem.message);
    this.problem = problem;
  }
}

/** Stops the reading with a located problem. Lines and columns count from 1. */
export function fail(code: string, message: string, line?: number, column?: number): never {
  throw new ReadFailure({
    code,
    message,
    ...(line === undefined ? {} : { line }),
    ...(column === undefined ? {} : { column }),
  });
}
