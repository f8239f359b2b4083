/** What a person asks for in the search box: words, and numbers of dips said as a sentence. Pure. */

export interface DipRange {
  fromHz: number | null;
  toHz: number | null;
  swrUnder: number | null;
  swrOver: number | null;
  verdict: "open" | "proposed" | "settled" | null;
}

export interface Question {
  /** What is left of the text when the numbers are taken out. */
  words: string;
  /** Null where no numbers were asked for. */
  dips: DipRange | null;
}

/** "choke dips between 50 and 54 MHz with SWR under 1.5" → the word "choke", 50 to 54 MHz, under 1.5. */
export function parseQuestion(text: string): Question {
  const dips: DipRange = { ...NO_RANGE };
  let rest = text.normalize("NFC").slice(0, MOST_CHARACTERS);
  for (const [pattern, keep] of PHRASES) {
    const found = pattern.exec(rest);
    if (!found) continue;
    keep(dips, found.slice(1));
    rest = `${rest.slice(0, found.index)} ${rest.slice(found.index + found[0].length)}`;
  }
  const asked = Object.values(dips).some((value) => value !== null);
  if (!asked) return { words: tidy(text), dips: null };
  return { words: tidy(rest.replace(FILLING, " ")), dips: inOrder(dips) };
}

/** The sentence that `parseQuestion` makes the same range of. */
export function describeRange(range: DipRange): string {
  const { fromHz, toHz, swrUnder, swrOver, verdict } = range;
  const words = [verdict ? `${verdict} dips` : "dips"];
  if (fromHz !== null && toHz !== null) words.push(`between ${inMhz(fromHz)} and ${inMhz(toHz)} MHz`);
  else if (fromHz !== null) words.push(`above ${inMhz(fromHz)} MHz`);
  else if (toHz !== null) words.push(`below ${inMhz(toHz)} MHz`);
  if (swrUnder !== null && swrOver !== null) words.push(`with SWR between ${swrOver} and ${swrUnder}`);
  else if (swrUnder !== null) words.push(`with SWR under ${swrUnder}`);
  else if (swrOver !== null) words.push(`with SWR over ${swrOver}`);
  return words.join(" ");
}

/** The words to look for: letters and digits only, so that no sign means anything to the database. */
export function searchWords(text: string): string[] {
  const found =
    text
      .normalize("NFC")
      .slice(0, MOST_CHARACTERS)
      .match(/[\p{L}\p{N}_]+/gu) ?? [];
  const words = found.map((word) => word.toLowerCase()).filter((word) => !/^_+$/.test(word));
  return [...new Set(words)].slice(0, MOST_WORDS);
}

/** Hertz as megahertz, to the hertz, without zeros at the end. */
export function inMhz(hz: number): string {
  return String(Number((hz / 1e6).toFixed(6)));
}

const NO_RANGE: DipRange = { fromHz: null, toHz: null, swrUnder: null, swrOver: null, verdict: null };
const FACTORS: Record<string, number> = { hz: 1, khz: 1e3, mhz: 1e6, ghz: 1e9 };

const N = String.raw`(\d{1,12}(?:[.,]\d{1,9})?)(?::1)?`;
const U = String.raw`([kmg]?hz)\b`;
const TO = String.raw`\s*(?:and|to|-|–)\s*`;
const UNDER = String.raw`(?:(?:is\s+)?(?:under|below|less\s+than|at\s+most)|<=?|≤)`;
const OVER = String.raw`(?:(?:is\s+)?(?:over|above|more\s+than|at\s+least)|>=?|≥)`;

type Keep = (dips: DipRange, parts: string[]) => void;

/** In this order: what is found is taken out before the next one looks. */
const PHRASES: [RegExp, Keep][] = [
  phrase(String.raw`\bswr\s+(?:between|from)?\s*${N}${TO}${N}`, (dips, [low, high]) => {
    [dips.swrOver, dips.swrUnder] = [numberOf(low), numberOf(high)];
  }),
  phrase(String.raw`\bswr\s*${UNDER}\s*${N}`, (dips, [swr]) => {
    dips.swrUnder = numberOf(swr);
  }),
  phrase(String.raw`\bswr\s*${OVER}\s*${N}`, (dips, [swr]) => {
    dips.swrOver = numberOf(swr);
  }),
  phrase(
    String.raw`(?:\b(?:between|from)\s+)?\b${N}\s*(?:${U})?${TO}${N}\s*${U}`,
    (dips, [low, unit, high, other]) => {
      dips.fromHz = hertz(low, unit || other);
      dips.toHz = hertz(high, other);
    },
  ),
  phrase(String.raw`\b(?:near|around|about|at)\s+${N}\s*${U}`, (dips, [at, unit]) => {
    dips.fromHz = Math.round(hertz(at, unit) * (1 - NEAR));
    dips.toHz = Math.round(hertz(at, unit) * (1 + NEAR));
  }),
  phrase(String.raw`(?:^|\s)${OVER}\s*${N}\s*${U}`, (dips, [from, unit]) => {
    dips.fromHz = hertz(from, unit);
  }),
  phrase(String.raw`(?:^|\s)${UNDER}\s*${N}\s*${U}`, (dips, [to, unit]) => {
    dips.toHz = hertz(to, unit);
  }),
  phrase(String.raw`\b(open|proposed|settled)\s+dips?\b`, (dips, [verdict]) => {
    dips.verdict = verdict.toLowerCase() as DipRange["verdict"];
  }),
];

function phrase(source: string, keep: Keep): [RegExp, Keep] {
  return [new RegExp(source, "iu"), keep];
}

function numberOf(text: string): number {
  return Number(text.replace(",", "."));
}

function hertz(text: string, unit: string): number {
  return Number((numberOf(text) * FACTORS[unit.toLowerCase()]).toFixed(3));
}

function inOrder(range: DipRange): DipRange {
  const { fromHz, toHz, swrUnder, swrOver } = range;
  const swap = fromHz !== null && toHz !== null && fromHz > toHz;
  const swapSwr = swrUnder !== null && swrOver !== null && swrOver > swrUnder;
  return {
    ...range,
    ...(swap ? { fromHz: toHz, toHz: fromHz } : {}),
    ...(swapSwr ? { swrUnder: swrOver, swrOver: swrUnder } : {}),
  };
}

function tidy(text: string): string {
  return text.replace(/\s+/g, " ").trim();
}

/** "Near" a frequency: 2 per cent either way, about what trimming an element by a few centimetres moves a dip. */
const NEAR = 0.02;
const MOST_CHARACTERS = 200;
const MOST_WORDS = 8;
/** Small words around the numbers. */
const FILLING = /\b(?:dips?|with|and|an?|in|the|of|whose)\b/giu;
