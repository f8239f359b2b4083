import { describe, expect, it } from "vitest";
import { isForeign, refuseForeignOrigin } from "~/auth/origin.server";

const HERE = "http://localhost:3000";
const ask = (headers: Record<string, string>, method = "POST", path = "/theme") =>
  new Request(`${HERE}${path}`, { method, headers });

describe("isForeign", () => {
  it.each([
    [{}, false],
    [{ Origin: HERE }, false],
    [{ Origin: "http://localhost:3001" }, true],
    [{ Origin: "https://localhost:3000" }, true],
    [{ Origin: "null" }, true],
    [{ Origin: "" }, true],
    [{ "Sec-Fetch-Site": "same-origin" }, false],
    [{ "Sec-Fetch-Site": "none" }, false],
    [{ "Sec-Fetch-Site": "same-site" }, true],
    [{ "Sec-Fetch-Site": "cross-site" }, true],
  ])("judges %j", (headers, foreign) => {
    expect(isForeign(ask(headers as Record<string, string>), [HERE])).toBe(foreign);
  });
});

describe("refuseForeignOrigin", () => {
  const foreign = { Origin: "https://elsewhere.example" };

  it.each(["POST", "PUT", "PATCH", "DELETE"])("refuses %s from another site with 403", (method) => {
    try {
      refuseForeignOrigin({ request: ask(foreign, method) });
    } catch (thrown) {
      expect((thrown as { init: ResponseInit }).init.status).toBe(403);
      return;
    }
    expect.unreachable();
  });

  it("lets reading through, and the API, which takes no cookie", () => {
    refuseForeignOrigin({ request: ask(foreign, "GET") });
    refuseForeignOrigin({ request: ask(foreign, "POST", "/api/v1/dips/x/notes") });
    refuseForeignOrigin({ request: ask({ Origin: HERE }) });
  });
});
