import { describe, expect, it } from "vitest";
import { persistently } from "~/services/bundle/store.server";

describe("a part of an upload", () => {
  const fault = (status: number) =>
    Object.assign(new Error(`${status}`), { $metadata: { httpStatusCode: status } });
  const failing = (times: number, error: Error) => {
    const tries: number[] = [];
    const work = async (attempt: number) => {
      tries.push(attempt);
      if (attempt <= times) throw error;
      return "stored";
    };
    return { work, tries };
  };

  it.each([
    ["that was not answered", new Error("socket hang up")],
    ["that met a fault of the store", fault(503)],
    ["that came too fast", fault(429)],
  ])("%s is sent again", async (_, error) => {
    const { work, tries } = failing(2, error);
    expect(await persistently(work, [1, 1, 1])).toBe("stored");
    expect(tries).toEqual([1, 2, 3]);
  });

  it("that was refused is not, and one that never goes ends", async () => {
    const refused = failing(9, fault(404));
    await expect(persistently(refused.work, [1, 1])).rejects.toThrow("404");
    expect(refused.tries).toEqual([1]);
    const never = failing(9, fault(500));
    await expect(persistently(never.work, [1, 1])).rejects.toThrow("500");
    expect(never.tries).toEqual([1, 2, 3]);
  });
});
