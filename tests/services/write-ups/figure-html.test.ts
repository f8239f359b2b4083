import { expect, it } from "vitest";
import { type FigurePlace, figureDrawer, PLATE_ADDRESS } from "~/services/write-ups/figure-html";
import { FIGURE_ID, type FrozenFigure, parseFrozen } from "~/services/write-ups/frozen";

const dip: FrozenFigure = {
  subject: "dip:abc",
  label: null,
  title: 'The dip of "<Before>"',
  wide: `<svg><defs><path id="${FIGURE_ID}-land"/></defs></svg>`,
  narrow: `<svg><defs><path id="${FIGURE_ID}-land"/></defs></svg>`,
  numbers: { columns: ["Of the dip", "Number"], rows: [["SWR", "1.21 <b>"]] },
  path: "/projects/p/dips/abc",
  asOf: "2026-05-01T10:00:00.000Z",
};
const plate: FrozenFigure = {
  ...dip,
  subject: "plate:k3f",
  label: "Plate 3",
  wide: null,
  narrow: null,
  numbers: null,
  path: "/plates/k3f",
  asOf: null,
};
const standing = { withdrawnAt: null, withdrawnReason: "" };

function draw(subject: string, place: Partial<FigurePlace> = {}, n = 1) {
  const whole: FigurePlace = {
    figures: [dip, plate],
    plates: new Map([["k3f", standing]]),
    plateSource: PLATE_ADDRESS,
    linkTo: ({ path }) => path,
    ...place,
  };
  return figureDrawer(whole)(subject, n);
}

it("shows a drawing for wide and one for narrow pages, each with ids of its own", () => {
  const [one, other] = [draw("dip:abc"), draw("dip:abc", {}, 2)];
  const ids = [one, other].flatMap((figure) => figure?.drawing.match(/id="[^"]+"/g) ?? []);
  expect(ids).toHaveLength(4);
  expect(new Set(ids).size).toBe(4);
});

it("says of when numbers are, and escapes what a person wrote", () => {
  const under = draw("dip:abc")?.under ?? "";
  expect(under).toContain("The dip of &quot;&lt;Before&gt;&quot;; numbers as of 1 May 2026, 10:00 UTC");
  expect(under).toContain("<td>1.21 &lt;b&gt;</td>");
});

it("leads nowhere for a reader who could not open it", () => {
  expect(draw("dip:abc", { linkTo: () => null })?.under).not.toContain("href");
});

it("shows a plate's frozen drawings in both themes and widths", () => {
  const { drawing = "", label } = draw("plate:k3f") ?? {};
  expect(label).toBe("Figure 1, Plate 3");
  for (const address of [
    "k3f.svg",
    "k3f.svg?width=narrow",
    "k3f.svg?theme=dark",
    "k3f.svg?theme=dark&amp;width=narrow",
  ]) {
    expect(drawing).toContain(`"/plates/${address}"`);
  }
});

it("says why a plate is shown no more", () => {
  const withdrawnAt = new Date("2026-06-02T09:00Z");
  const plates = new Map([["k3f", { withdrawnAt, withdrawnReason: "A wrong <scale>" }]]);
  expect(draw("plate:k3f", { plates })?.drawing).toBe(
    '<p class="article-missing">This plate was withdrawn on 2 Jun 2026: A wrong &lt;scale&gt;</p>',
  );
  expect(draw("plate:k3f", { plates: new Map() })?.drawing).toContain("not here any more");
  expect(draw("plate:k3f", { plateSource: () => null })?.drawing).toContain("can't be had just now");
});

it("draws nothing for what was not frozen, and says so for a curve that was not read", () => {
  expect(draw("dip:zzz")).toBeNull();
  const unread = { ...dip, wide: null, narrow: null };
  expect(draw("dip:abc", { figures: [unread] })?.drawing).toContain("The curve can't be drawn");
});

it.each(["", "{", "null", "[]", '{"figures":{}}', '{"figures":[{"numbers":"x"}],"licence":""}'])(
  "what was stored as %j shows no figures",
  (text) => {
    expect(parseFrozen(text).figures).toEqual([]);
  },
);

it("what was frozen is read as it was", () => {
  const frozen = { figures: [dip, plate], project: "A vertical", licence: "CC-BY-4.0" };
  expect(parseFrozen(JSON.stringify(frozen))).toEqual(frozen);
});
