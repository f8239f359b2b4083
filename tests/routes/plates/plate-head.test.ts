import { expect, test } from "vitest";
import { plateHead } from "../../../app/routes/plates/plate-head.ts";

const PLATE = {
  publicId: "p1",
  number: 3,
  title: "The dip",
  address: "https://swale.example/plates/p1",
  madeAt: "2026-04-19T09:00:00.000Z",
  madeBy: "Ada Marsh",
  people: [{ name: "Cleo Reed" }, { name: "Ada Marsh" }],
  project: { title: "Reed bank" },
  licence: { address: null },
  hasTouchstone: false,
  description: "One dip.",
};
const head = (more: Partial<typeof PLATE> = {}) => plateHead({ ...PLATE, ...more }, "https://swale.example");
const contents = (name: string) =>
  head().flatMap((one) => ("name" in one && one.name === name ? [(one as { content: string }).content] : []));
const links = (rel: string) =>
  head().flatMap((one) => ("tagName" in one && (one as { rel?: string }).rel === rel ? [one] : []));

test("says how to cite it: whoever made it first, each person once", () => {
  expect(contents("citation_author")).toEqual(["Ada Marsh", "Cleo Reed"]);
  expect(contents("citation_publication_date")).toEqual(["2026/04/19"]);
  expect(contents("citation_title")).toEqual(["Plate 3: The dip"]);
});

test("names its forms, and asks oEmbed for its own address", () => {
  expect(links("alternate").map((one) => (one as { href: string }).href)).toContain(
    "https://swale.example/oembed?format=json&url=https%3A%2F%2Fswale.example%2Fplates%2Fp1",
  );
  expect(links("license")).toEqual([]);
});
