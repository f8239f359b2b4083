import { deflateSync } from "node:zlib";
import sharp from "sharp";
import { beforeEach, describe, expect, it } from "vitest";
import { newPublicId } from "~/db/ids.server";
import * as people from "~/db/people.server";
import { findZeroLines } from "~/db/readings.server";
import * as sweeps from "~/db/sweeps.server";
import { DEFAULT_SETTINGS } from "~/measurement/sweep";
import { takeIn } from "~/services/intake.server";
import { keepPicture, tryPicture } from "~/services/picture-readings.server";
import { createProject } from "~/services/projects.server";
import { loadPoints } from "~/services/sweep-points.server";
import { drawnScreen, PLOT, screenSvg } from "../drawn-screen.ts";

let by: { id: number };
let project: { id: number; publicId: string };

beforeEach(async () => {
  by = { id: await people.insert({ userName: `ada-${newPublicId()}`, name: "Ada", email: null }) };
  project = await createProject(
    { title: "Screens", summary: "", visibility: "private", ituRegion: null },
    by.id,
  );
});

function taken(
  bytes: Uint8Array,
  more: { name?: string; keepUnread?: boolean; progress?: (s: string) => void } = {},
) {
  const { name = "screen.png", keepUnread = true, progress } = more;
  return takeIn({ project, by, file: { name, bytes }, keepUnread, progress });
}

async function found(result: Awaited<ReturnType<typeof takeIn>>) {
  const sweep = "sweepPublicId" in result ? await sweeps.findByPublicId(result.sweepPublicId) : undefined;
  if (!sweep) throw new Error(`no sweep: ${JSON.stringify(result)}`);
  return sweep;
}

const AXES = {
  frame: { left: PLOT.left, top: PLOT.top, right: PLOT.right, bottom: PLOT.bottom },
  startHz: 5e6,
  stopHz: 25e6,
  scale: "linear",
  top: 0,
  bottom: -40,
  quantity: "s11-db",
  referenceOhm: 50,
  traceColor: "#ffd23c",
} as const;

describe("a picture that is taken in", () => {
  it("becomes a sweep by itself where everything is certain, stage by stage", async () => {
    const stages: string[] = [];
    const result = await taken(await drawnScreen(), { progress: (stage) => stages.push(stage) });
    expect(result).toMatchObject({ kind: "read", dipCount: 1 });
    expect(result.kind === "read" && result.halfColumnHz).toBeCloseTo(20e6 / 1600, 0);
    expect(stages.slice(0, 4)).toEqual(["decoded", "frame", "axes", "trace"]);
    const { sweep, reading, analysis } = await found(result);
    expect(reading?.reading).toMatchObject({ format: "screenshot", picture: { width: PLOT.width } });
    expect(reading?.reading?.picture?.sources).toMatchObject({ startHz: "printed", top: "printed" });
    expect(Math.abs((analysis?.dips[0].frequencyHz ?? 0) - 14.2e6)).toBeLessThan(15_000);
    expect(sweep.startHz).toBeCloseTo(5e6, -5);
    const points = await loadPoints(reading?.id ?? 0);
    expect(points.pictureLimits?.frequencyHz[10]).toBeCloseTo(20e6 / 1600, 0);
    expect(analysis?.dips[0].frequencyUncertaintyHz).toBeGreaterThan(0);
  });

  it("waits for a person where it is not, with all that was found", async () => {
    const result = await taken(await drawnScreen({ bare: true }));
    expect(result).toMatchObject({ kind: "unread", problem: { code: "axes-needed" } });
    const { reading, sweep } = await found(result);
    expect(sweep.pointCount).toBeNull();
    expect(reading?.reading?.spec.screenshot).toMatchObject({ traceColor: "#ffd23c", frame: AXES.frame });
    const doubtful = await taken(await drawnScreen({ decoy: true }));
    expect(doubtful).toMatchObject({ kind: "unread", problem: { code: "trace-doubtful" } });
  });

  it("is refused by the interface for scripts where it is not certain", async () => {
    const bytes = await drawnScreen({ decoy: true });
    expect(await taken(bytes, { keepUnread: false })).toMatchObject({ kind: "refused" });
    const given = { screenshot: { traceColor: "#ff5566" } };
    const file = { name: "screen.png", bytes };
    const again = await takeIn({ project, by, file, keepUnread: false, given });
    expect(again.kind).toBe("read");
  });
});

describe("a corrected picture", () => {
  it("is kept as chosen, and its choices give the same points again without reading print", async () => {
    const first = await found(await taken(await drawnScreen({ bare: true })));
    const spec = {
      ...first.reading?.reading?.spec.screenshot,
      startHz: 5e6,
      stopHz: 25e6,
      top: 0,
      bottom: -40,
    };
    expect(await keepPicture(first, { spec, zeroAtCrest: false }, DEFAULT_SETTINGS, by.id)).toBeNull();
    const kept = await found({ kind: "twice", sweepPublicId: first.sweep.publicId, title: "" });
    expect(kept.sweep.problem).toBeNull();
    expect(kept.reading?.given.screenshot).toEqual({ startHz: 5e6, stopHz: 25e6, top: 0, bottom: -40 });
    expect(kept.reading?.reading?.picture?.sources).toMatchObject({ startHz: "given", scale: "assumed" });
    const resolved = kept.reading?.reading?.spec.screenshot ?? {};
    expect(
      await keepPicture(kept, { spec: resolved, zeroAtCrest: false }, DEFAULT_SETTINGS, by.id),
    ).toBeNull();
    const again = await found({ kind: "twice", sweepPublicId: first.sweep.publicId, title: "" });
    expect(again.reading?.number).toBe(3);
    expect(await loadPoints(again.reading?.id ?? 0)).toEqual(await loadPoints(kept.reading?.id ?? 0));
    expect(again.reading?.reading?.spec).toEqual(kept.reading?.reading?.spec);
  });

  it("changes nothing where the choices give no sweep", async () => {
    const first = await found(await taken(await drawnScreen()));
    const spec = { ...AXES, stopHz: 1e6 };
    const problem = await keepPicture(first, { spec, zeroAtCrest: false }, DEFAULT_SETTINGS, by.id);
    expect(problem?.code).toBe("axes-wrong");
    const after = await found({ kind: "twice", sweepPublicId: first.sweep.publicId, title: "" });
    expect(after.reading?.number).toBe(1);
  });

  it("is tried quickly once its pixels are at hand, and tried only", async () => {
    const first = await found(await taken(await drawnScreen()));
    const choices = { spec: { ...AXES, masked: [{ fromX: 400, toX: 500 }] }, zeroAtCrest: false };
    await tryPicture(first, choices, DEFAULT_SETTINGS);
    const tried = await tryPicture(first, choices, DEFAULT_SETTINGS);
    expect(tried.dips.filter(({ frequency }) => frequency.startsWith("14"))).toEqual([]);
    expect(tried.picture?.line).toHaveLength(2);
    expect(
      (await found({ kind: "twice", sweepPublicId: first.sweep.publicId, title: "" })).reading?.number,
    ).toBe(1);
    const printed = await tryPicture(
      first,
      { spec: { frame: AXES.frame }, zeroAtCrest: false },
      DEFAULT_SETTINGS,
      true,
    );
    expect(printed.reading?.spec.screenshot).toMatchObject({ startHz: 5e6, stopHz: 25e6 });
  });
});

describe("a level picture", () => {
  it("asks for its 0 dB line once and remembers it for the screen, in this project", async () => {
    const first = await taken(await drawnScreen({ levelTopDb: -10 }));
    expect(first).toMatchObject({ kind: "unread", problem: { code: "zero-db-needed" } });
    const sweep = await found(first);
    const spec = { ...sweep.reading?.reading?.spec.screenshot, zeroDb: -10 };
    expect(await keepPicture(sweep, { spec, zeroAtCrest: false }, DEFAULT_SETTINGS, by.id)).toBeNull();
    const second = await found(await taken(await drawnScreen({ levelTopDb: -10, dipMHz: 9.4, salt: "b" })));
    expect(second.sweep.problem).toBeNull();
    expect(second.reading?.reading?.spec.screenshot?.zeroDb).toBe(-10);
    expect(second.reading?.reading?.assumed[0]).toContain("as the last file of this shape");
    expect(second.analysis?.dips[0].frequencyHz).toBeCloseTo(9.4e6, -5);
    expect(await findZeroLines(project.id, second.sweep.id)).toMatchObject([
      { title: "screen", zeroDb: -10 },
    ]);
    const other = await taken(await drawnScreen({ salt: "c" }));
    expect(other.kind).toBe("read");
  });

  it("takes the crest of the sweep for it when asked to", async () => {
    const sweep = await found(await taken(await drawnScreen({ levelTopDb: -10 })));
    const spec = sweep.reading?.reading?.spec.screenshot ?? {};
    expect(await keepPicture(sweep, { spec, zeroAtCrest: true }, DEFAULT_SETTINGS, by.id)).toBeNull();
    const kept = await found({ kind: "twice", sweepPublicId: sweep.sweep.publicId, title: "" });
    expect(kept.reading?.reading?.spec.screenshot?.zeroDb).toBeCloseTo(-11.7, 0);
    const { magnitude } = await loadPoints(kept.reading?.id ?? 0);
    expect(Math.max(...magnitude.filter((value) => !Number.isNaN(value)))).toBeCloseTo(1, 2);
  });
});

describe("what is not read", () => {
  it("is refused with a sentence, whatever it is, and harms nothing", { timeout: 120_000 }, async () => {
    const good = await drawnScreen({ salt: "refusals" });
    const frames = await Promise.all([drawnScreen(), drawnScreen({ dipMHz: 9 })]);
    const animated = await sharp(frames, { join: { animated: true } })
      .webp({ delay: [100, 100] })
      .toBuffer();
    const script = screenSvg().replace("<rect", "<script>alert(1)</script><rect");
    const before = process.memoryUsage().rss;
    const cases: [string, Uint8Array, string, RegExp][] = [
      ["moving.webp", animated, "animated", /animated/],
      ["bomb.png", bombPng(20_000, 10_000), "too-large", /40 megapixels/],
      ["cut.png", good.subarray(0, good.length - 3000), "damaged", /damaged or cut short/],
      ["script.svg", new TextEncoder().encode(script), "not-a-format", /SVG drawing/],
    ];
    for (const [name, bytes, code, words] of cases) {
      const result = await taken(bytes, { name });
      expect(result, name).toMatchObject({ kind: "refused", problem: { code } });
      expect(result.kind === "refused" && result.problem.message).toMatch(words);
    }
    const rest = await sharp({ create: { width: 640, height: 480, channels: 3, background: "#7a8" } })
      .png()
      .toBuffer();
    const empty = await taken(rest);
    expect(empty).toMatchObject({ kind: "unread", problem: { code: "no-frame" } });
    expect((await found(empty)).reading?.reading?.format).toBe("screenshot");
    expect(process.memoryUsage().rss - before).toBeLessThan(MOST_MEMORY);
    expect((await taken(good)).kind).toBe("read");
  });
});

/** The bomb's pixels alone would be 800 MB. */
const MOST_MEMORY = 350 * 1024 * 1024;

/** A PNG of one grey all over: small as a file, 200 megapixels when decoded. */
function bombPng(width: number, height: number): Uint8Array {
  const chunk = (type: string, data: Uint8Array) => {
    const body = Buffer.concat([Buffer.from(type, "latin1"), data]);
    const out = Buffer.alloc(body.length + 8);
    out.writeUInt32BE(data.length, 0);
    body.copy(out, 4);
    out.writeUInt32BE(crc32(body), body.length + 4);
    return out;
  };
  const head = Buffer.alloc(13);
  head.writeUInt32BE(width, 0);
  head.writeUInt32BE(height, 4);
  head.set([1, 0, 0, 0, 0], 8);
  const pixels = deflateSync(Buffer.alloc((width / 8 + 1) * height));
  const signature = Buffer.from([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a]);
  return Buffer.concat([
    signature,
    chunk("IHDR", head),
    chunk("IDAT", pixels),
    chunk("IEND", Buffer.alloc(0)),
  ]);
}

/** The PNG specification's check sum (ISO 3309), bit by bit. */
function crc32(bytes: Uint8Array): number {
  let crc = 0xffffffff;
  for (const byte of bytes) {
    crc ^= byte;
    for (let bit = 0; bit < 8; bit++) crc = crc & 1 ? (crc >>> 1) ^ 0xedb88320 : crc >>> 1;
  }
  return (crc ^ 0xffffffff) >>> 0;
}
