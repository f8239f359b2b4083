import { z } from "zod";
import { type DipRange, inMhz } from "~/services/search-question";

/** A number as a person writes it, empty for none; null where it is no number. */
const number = (most: number, words: string) =>
  z
    .string()
    .default("")
    .transform((text) => text.trim().replace(",", "."))
    .refine(
      (text) => text === "" || (/^\d*\.?\d+$/.test(text) && Number(text) > 0 && Number(text) < most),
      words,
    )
    .transform((text) => (text === "" ? null : Number(text)));

/** What the address of the page holds. An error keeps the page, with the words beside the field. */
export const searchSchema = z.object({
  q: z.string().max(200, "At most 200 characters.").default(""),
  from: number(1e6, "A frequency in MHz, such as 50 or 7.1."),
  to: number(1e6, "A frequency in MHz, such as 54 or 7.2."),
  under: number(1e6, "A number such as 1.5."),
  over: number(1e6, "A number such as 2."),
  verdict: z.enum(["", "open", "proposed", "settled"]).catch("").default(""),
});
export type SearchValues = z.output<typeof searchSchema>;

/** The numbers in the address as a range; null where there are none. */
export function rangeOf(values: SearchValues): DipRange | null {
  const { from, to, under, over } = values;
  const hz = (mhz: number | null) => (mhz === null ? null : Number((mhz * 1e6).toFixed(3)));
  const range: DipRange = {
    fromHz: hz(from),
    toHz: hz(to),
    swrUnder: under,
    swrOver: over,
    verdict: values.verdict === "" ? null : values.verdict,
  };
  return Object.values(range).some((value) => value !== null) ? range : null;
}

/** The same range in an address, with the words beside it. */
export function addressOf(words: string, range: DipRange | null): URLSearchParams {
  const params = new URLSearchParams();
  if (words) params.set("q", words);
  if (!range) return params;
  const { fromHz, toHz, swrUnder, swrOver, verdict } = range;
  if (fromHz !== null) params.set("from", inMhz(fromHz));
  if (toHz !== null) params.set("to", inMhz(toHz));
  if (swrUnder !== null) params.set("under", String(swrUnder));
  if (swrOver !== null) params.set("over", String(swrOver));
  if (verdict !== null) params.set("verdict", verdict);
  return params;
}
