import { performance } from "node:perf_hooks";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { type FormsTask, type MadeForm, makeForms } from "~/services/plates/make-forms.server";
import { BusyPrinting, closePrinter, printForms, printWriteUp } from "~/services/printing.server";
import { type DocumentTask, printDocument } from "~/services/write-ups/document.server";
import { materialOf, materialSweep, recordOf, sweepOf } from "./plates/sample.ts";

const sweep = sweepOf([{ hz: 7.1e6, ohm: 45, q: 12 }]);
const material = materialSweep("sweepaaaaa", "Before the trim, 50 Ω", sweep);
const plate: FormsTask = {
  record: recordOf(materialOf([material])),
  sweeps: [{ id: material.id, title: material.label, sweep, limits: undefined }],
};
const writeUp: DocumentTask = {
  publication: {
    version: { title: "A dip", number: 1, body: "# Words\n\nand $x^2$", publishedAt: new Date(0) },
    by: null,
    writer: "Ada Marsh",
    project: { title: "Reed loop", demo: 0 },
    writeUp: { publicId: "w", publishedNumber: 1 },
    frozen: { figures: [], project: "A vertical", licence: "CC-BY-4.0" },
  } as unknown as DocumentTask["publication"],
  origin: "https://swale.example",
  plates: new Map(),
  drawings: new Map(),
};

/** Milliseconds in which this thread could not answer anybody; waiting for a processor does not count. */
async function heldUp<T>(work: () => Promise<T>): Promise<{ result: T; ms: number }> {
  const before = performance.eventLoopUtilization();
  const result = await work();
  return { result, ms: performance.eventLoopUtilization(before).active };
}

describe("the printing thread", () => {
  let forms: MadeForm[];
  beforeAll(async () => {
    forms = await printForms(plate);
  }, 120_000);
  afterAll(closePrinter);

  it("gives the bytes that the same work gives in place, and holds nobody else up", async () => {
    const inPlace = await heldUp(() => makeForms(plate));
    expect(forms).toEqual(inPlace.result);
    expect(forms.every(({ bytes }) => Buffer.isBuffer(bytes) && bytes.length > 0)).toBe(true);
    const apart = await heldUp(() => Promise.all([printForms(plate), printWriteUp(writeUp)]));
    expect(apart.result[1].equals(await printDocument(writeUp))).toBe(true);
    // 100 ms is what a person does not notice; on a machine that is busy with other things all takes longer.
    expect(apart.ms).toBeLessThan(Math.max(100, inPlace.ms / 5));
  }, 60_000);

  it("says what went wrong in it, and goes on", async () => {
    const broken = { ...plate, record: { ...plate.record, madeAt: "no time" } };
    await expect(printForms(broken)).rejects.toThrow();
    expect(await printWriteUp(writeUp)).toHaveProperty("length");
  });

  it("takes no more than it can do in a minute, and ends without what waits", async () => {
    const many = Array.from({ length: 55 }, () =>
      printWriteUp(writeUp).then(
        () => "printed",
        (error) => (error instanceof BusyPrinting ? "refused" : "dropped"),
      ),
    );
    await closePrinter();
    const ends = await Promise.all(many);
    // One is being printed and fifty wait.
    expect(ends.filter((end) => end === "refused")).toHaveLength(4);
    expect(ends.filter((end) => end === "dropped").length).toBeGreaterThan(0);
  });
});
