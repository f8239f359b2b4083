import { inflateSync } from "node:zlib";
import { describe, expect, it } from "vitest";
import { completeSvg, loadCoverage, runsOf } from "~/services/font-runs.server";
import { printPdf } from "~/services/pdf.server";

const info = { title: "A paper", creationDate: new Date("2026-12-01T10:00:00Z") };

describe("printPdf", () => {
  it("prints the same bytes again, on A4, with its fonts inside", async () => {
    const definition = () => ({
      info,
      content: [
        { text: "50 Ω and “dips”" },
        "≥ 3 dB",
        {
          svg: '<svg xmlns="http://www.w3.org/2000/svg" width="9" height="9"><text y="8" font-family="Sometype Mono">Γ</text></svg>',
        },
      ],
      footer: (page: number) => `page ${page}`,
    });
    const [first, second] = [await printPdf(definition()), await printPdf(definition())];
    expect(first.equals(second)).toBe(true);
    const text = first.toString("latin1");
    expect(text.slice(0, 5)).toBe("%PDF-");
    expect(text.match(/\/Type \/Page\b(?!s)/g)).toHaveLength(1);
    expect(text).toContain("/MediaBox [0 0 595.28 841.89]");
    const fonts = new Set(text.match(/\/FontName \/[A-Z]{6}\+[\w-]+/g)?.map((one) => one.split("+")[1]));
    expect(fonts).toEqual(
      new Set(["AtkinsonHyperlegibleNext-Regular", "Roboto-Regular", "SometypeMono-Regular"]),
    );
    expect(text.match(/\/FontFile2/g)?.length).toBeGreaterThanOrEqual(2);
    expect(streamsOf(first).some((stream) => stream.includes(" Tf"))).toBe(true);
  });

  it("fetches nothing", async () => {
    const refused = printPdf({ info, content: [{ image: "http://127.0.0.1:9/a.png" }] });
    await expect(refused).rejects.toThrow();
    await expect(printPdf({ info, content: [{ image: "/etc/hostname" }] })).rejects.toThrow();
  });
});

describe("what our fonts lack", () => {
  it("is set apart, and nothing of the text is lost", async () => {
    const covered = await loadCoverage();
    const text = "50 Ω, Γ ≥ ∞ ± µ − “é” ő";
    const runs = runsOf(text, covered);
    expect(runs.map((run) => run.text).join("")).toBe(text);
    // What the latin files of these fonts hold, by their publisher's list of ranges.
    expect(runs.filter(({ rest }) => rest).map((run) => run.text)).toEqual(["Ω", "Γ", "≥", "∞", "µ", "ő"]);
    const svg = '<text x="1">a Ω &amp; b</text><title>Ω</title>';
    expect(completeSvg(svg, covered)).toBe(
      '<text x="1"><tspan>a </tspan><tspan font-family="Roboto">Ω</tspan><tspan> &amp; b</tspan></text><title>Ω</title>',
    );
  });
});

/** The unpacked streams of a PDF that can be unpacked. */
function streamsOf(pdf: Buffer): string[] {
  const found: string[] = [];
  for (let at = pdf.indexOf("stream\n"); at >= 0; at = pdf.indexOf("stream\n", at + 7)) {
    try {
      found.push(inflateSync(pdf.subarray(at + 7)).toString("latin1"));
    } catch {
      // A font's or an end's.
    }
  }
  return found;
}
