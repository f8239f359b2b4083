import { plainSigns } from "./cells.ts";
import { plain } from "./headings.ts";

const WORDS =
  /\b(?:z ?0|zo|zref|z ref|z sys|r ?0|(?:reference|system|char\w*|nominal|norm\w*|port|source) (?:impedance|resistance|z)|impedance (?:de )?(?:reference|caracteristique|system)|\w*(?:bezugs|referenz|system|wellen|nenn)\w*(?:impedanz|widerstand)|impedancia (?:de )?(?:referencia|caracteristica|sistema)|impedenza (?:di )?(?:riferimento|caratteristica|sistema)|(?:referentie|systeem|karakteristieke) ?impedantie)\b[^0-9]{0,16}(\d+(?:[.,]\d+)?)/;
const OHM_SYSTEM = /\b(\d+(?:[.,]\d+)?) ?ohm (?:system|reference|referenz|bezug|sistema|systeme)/;
const LARGEST_OHM = 10_000;

/** The reference impedance that the lines of a preamble or heading name, in ohm; null where they name none. */
export function referenceOhmIn(texts: string[]): number | null {
  for (const raw of texts) {
    const text = plain(plainSigns(raw));
    const match = text.match(WORDS) ?? text.match(OHM_SYSTEM);
    if (!match) continue;
    const ohm = Number(match[1].replace(",", "."));
    if (ohm > 0 && ohm <= LARGEST_OHM) return ohm;
  }
  return null;
}
