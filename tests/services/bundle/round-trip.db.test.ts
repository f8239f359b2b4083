import { execFileSync } from "node:child_process";
import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import { Readable } from "node:stream";
import { inArray } from "drizzle-orm";
import { beforeAll, describe, expect, it } from "vitest";
import * as runs from "~/db/bundle-runs.server";
import { db } from "~/db/client.server";
import * as plates from "~/db/plates.server";
import * as projects from "~/db/projects.server";
import { jobs } from "~/db/schema/index";
import * as mentions from "~/db/webmentions.server";
import { env } from "~/env.server";
import { accountOf } from "~/services/activity.server";
import { askForBundle, giveBundle, offered } from "~/services/bundle/runs.server";
import { workOnBundles } from "~/services/bundle/work.server";
import { frozenElsewhere } from "~/services/plates/frozen-elsewhere.server";
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
    // Kept, and nobody is asked about them or told anything: no job has begun.
    const kept = await mentions.findAllByProject(run?.projectId ?? 0, mentions.MENTION_STATES, 10);
    expect(kept.map(({ mention }) => mention.state).sort()).toEqual(["gone", "hidden", "shown", "verified"]);
    const waits = await db
      .select()
      .from(jobs)
      .where(inArray(jobs.kind, ["check-mention", "send-mentions"]));
    expect(waits).toEqual([]);
    const [plate] = await plates.findAllByProject(run?.projectId ?? 0);
    const row = (await plates.findByPublicId(plate.publicId)) as plates.PlateRow;
    const { address } = JSON.parse(row.record);
    expect(address).not.toContain(plate.publicId);
    expect(await frozenElsewhere(row, { address })).toEqual({
      address,
      otherSite: false,
      at: expect.any(Date),
    });
    expect(await frozenElsewhere(row, { address: `${env.BASE_URL}/plates/${plate.publicId}` })).toBeNull();
    // Who is known by name only is named, here as everywhere.
    const account = await accountOf({ id: run?.projectId ?? 0, publicId: found?.project.publicId ?? "" });
    const names = new Set(account.days.flatMap(({ lines }) => lines.flatMap(({ by }) => by)));
    expect([...names].sort()).toEqual(["Ada Marsh (from a bundle)", "Bram Sedge"]);
  });
});
