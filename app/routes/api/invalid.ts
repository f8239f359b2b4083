import type { ZodError } from "zod";
import { problem } from "./problem.ts";

/** What was sent is understood but wrong, field by field. */
export function invalid(faults: ZodError | { field: string; message: string }[]): Response {
  const errors = Array.isArray(faults)
    ? faults
    : faults.issues.map((issue) => ({ field: issue.path.join(".") || "body", message: issue.message }));
  const detail = `${errors.map(({ field, message }) => `${field}: ${message}`).join(" ")} Nothing was stored.`;
  return problem({ status: 422, code: "invalid", detail, errors });
}
