import { expect } from "vitest";
import { problemShape } from "~/routes/api/schemas";

/** The answer, checked to be a problem document of this status. */
export async function problemOf(response: Response, status: number) {
  expect(response.status).toBe(status);
  expect(response.headers.get("Content-Type")).toBe("application/problem+json");
  const body = problemShape.parse(await response.json());
  expect(body.status).toBe(status);
  expect(body.type).toBe("about:blank");
  return body;
}
