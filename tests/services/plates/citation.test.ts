import { parse } from "@retorquere/bibtex-parser";
import CSL from "citeproc";
import { describe, expect, it } from "vitest";
import { bibtex, copyTexts, cslJson, sentence } from "../../../app/services/plates/citation.ts";
import type { PlateRecord } from "../../../app/services/plates/record.ts";
import { choicesOf, materialOf, materialSweep, recordOf, sweepOf } from "./sample.ts";

const title = "50 % of {all} & $7_1 #2 ~ ^ \\ “Ω” <b>";
const material = materialOf(
  [materialSweep("sweepaaaaa", "Reeds", sweepOf([{ hz: 7.1e6, ohm: 45, q: 12 }]))],
  {
    choices: choicesOf({ title }),
  },
);
const record: PlateRecord = recordOf(material, { version: 2 });

describe("how a plate is cited", () => {
  it("is BibTeX that another reader takes apart into the same words", () => {
    const { entries, errors } = parse(bibtex(record), { sentenceCase: false });
    expect(errors).toEqual([]);
    const [{ key, type, fields }] = entries;
    expect([key, type]).toEqual(["swale-plate-abcdefghjk", "misc"]);
    expect(
      String(fields.title)
        .replace(/<[^>b]*>|<\/[^>b]*>/g, "")
        .replaceAll("\u00a0", " "),
    ).toContain("50 % of {all} & $7_1 #2");
    expect(fields.author).toMatchObject([{ name: "Ada Marsh" }]);
    expect(fields.year).toBe("2026");
    expect(fields.url).toBe("https://swale.example/plates/abcdefghjk");
    expect(fields.howpublished).toBe("Plate 3, version 2 of “Reed bank vertical”");
  });

  it("is CSL-JSON that another program makes a reference of", () => {
    const [item] = JSON.parse(cslJson(record));
    const engine = new CSL.Engine({ retrieveLocale: () => LOCALE, retrieveItem: () => item }, STYLE);
    engine.updateItems([item.id]);
    const [, [reference]] = engine.makeBibliography();
    expect(reference).toContain("Ada Marsh");
    expect(reference).toContain("Reed bank vertical");
    expect(reference).toContain("2026");
    expect(reference).toContain("https://swale.example/plates/abcdefghjk");
  });

  it("is a sentence, and the same in the ways that texts are written", () => {
    expect(sentence(record)).toBe(
      `Ada Marsh: “${title}”, plate 3, version 2 of “Reed bank vertical”, 1 Dec 2026, https://swale.example/plates/abcdefghjk`,
    );
    const { markdown, html, latex, plain } = copyTexts(record);
    expect(plain).toContain("(Creative Commons Attribution 4.0 (CC BY 4.0))");
    expect(markdown).toContain(
      "](https://swale.example/plates/abcdefghjk.svg)](https://swale.example/plates/abcdefghjk)",
    );
    expect(markdown).toContain("\\<b\\>");
    expect(markdown).toContain("{all} \\& $7");
    expect(html).not.toContain("<b>");
    expect(html).toContain('alt="Plate 3, version 2: 50 % of {all} &amp; $7_1');
    expect(latex).toContain(
      "50 \\% of \\{all\\} \\& \\$7\\_1 \\#2 \\textasciitilde{} \\textasciicircum{} \\textbackslash{}",
    );
  });
});

/** As small a style as its program takes. */
const STYLE = `<?xml version="1.0" encoding="utf-8"?>
<style xmlns="http://purl.org/net/xbiblio/csl" class="in-text" version="1.0"><info><title>t</title><id>t</id><updated>2026-01-01T00:00:00+00:00</updated></info>
<citation><layout><text variable="title"/></layout></citation>
<bibliography><layout><names variable="author"><name/></names><text prefix=" " variable="title"/><text prefix=" " variable="container-title"/><date prefix=" " variable="issued"><date-part name="year"/></date><text prefix=" " variable="URL"/></layout></bibliography></style>`;
const LOCALE = `<?xml version="1.0" encoding="utf-8"?><locale xmlns="http://purl.org/net/xbiblio/csl" version="1.0" xml:lang="en-US"><terms><term name="and">and</term><term name="et-al">et al.</term></terms></locale>`;
