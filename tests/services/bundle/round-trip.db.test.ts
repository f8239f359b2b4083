import { execFileSync } from "node:child_process";
import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import { Readable } from "node:stream";
import { beforeAll, describe, expect, it } from "vitest";
import * as runs from "~/db/bundle-runs.server";
import * as projects from "~/db/projects.server";
import { askForBundle, giveBundle, offered } from "~/services/bundle/runs.server";
import { workOnBundles } from "~/services/bundle/work.server";
import { getObject } from "~/services/storage.server";
import { compareProjects, MAY_DIFFER } from "../../../scripts/bundles/compare.ts";
import { makeFullProject } from "../../../scripts/bundles/full-project.ts";

let full: Awaited<ReturnType<typeof makeFullProject>>;
let zip: Buffer;

beforeAll(async () => {
  full = await makeFullProject(20);
  const asked = await askForBundle(full.project.id, full.ada.id);
  await workOnBundles();
  const run = await runs.findByPublicId(asked.run.publicId);
  const offer = run && offered(run);
  if (!offer) throw new Error(`No bundle was made: ${JSON.stringify(run)}`);
  zip = Buffer.from(await getObject(offer.storageKey));
}, 180_000);

function unpacked<T>(work: (folder: string) => T): T {
  const folder = mkdtempSync(path.join(tmpdir(), "bundle-test-"));
  try {
    writeFileSync(path.join(folder, "b.zip"), zip);
    execFileSync("python3", ["-m", "zipfile", "-e", "b.zip", "."], { cwd: folder });
    const inside = execFileSync("ls", { cwd: folder, encoding: "utf8" })
      .split("\n")
      .find((name) => name.startsWith("swale-"));
    return work(path.join(folder, inside ?? ""));
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

describe("a bundle", () => {
  it("passes sha256sum and sha512sum, manifest by manifest", () => {
    unpacked((folder) => {
      for (const sum of ["sha256", "sha512"]) {
        for (const kind of ["manifest", "tagmanifest"]) {
          const out = execFileSync(`${sum}sum`, ["-c", "--quiet", "--strict", `${kind}-${sum}.txt`], {
            cwd: folder,
            encoding: "utf8",
          });
          expect(out).toBe("");
        }
      }
    });
  });

  it("tells no address, token or key of anybody", () => {
    const text = unpacked((folder) =>
      execFileSync("sh", ["-c", "find . -type f ! -path '*/originals/*' -exec cat {} +"], {
        cwd: folder,
        encoding: "utf8",
        maxBuffer: 2 ** 28,
      }),
    );
    expect(text).not.toContain("@fennmarsh.example");
    expect(text).not.toContain("storageKey");
    expect(text).toContain("Bram Sedge");
  });

  it("comes back the same in every field, for somebody else", async () => {
    const given = await giveBundle(full.bram.id, Readable.from([zip]));
    if (given.kind !== "given") throw new Error(given.kind);
    await workOnBundles();
    const run = await runs.findByPublicId(given.run.publicId);
    expect(run?.report).toMatchObject({ people: 2 });
    expect(run?.state).toBe("done");
    const compared = await compareProjects(full.project.id, run?.projectId ?? 0);
    expect(compared.filter(({ different, field }) => different > 0 && !MAY_DIFFER.has(field))).toEqual([]);
    expect(compared.length).toBeGreaterThan(150);
    const found = await projects.findWithRoleById(run?.projectId ?? 0, full.bram.id);
    expect(found?.role).toBe("owner");
    expect(found?.project.visibility).toBe("private");
  });
});
