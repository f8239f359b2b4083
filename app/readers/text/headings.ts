import type { FrequencyUnit } from "../../measurement/sweep.ts";

/** What a column's heading says it holds. "decibel" and "reflection": known only in part. */
export type Role =
  | "frequency"
  | "s11-db"
  | "return-loss"
  | "swr"
  | "level"
  | "decibel"
  | "reflection"
  | "magnitude"
  | "angle"
  | "real"
  | "imaginary"
  | "resistance"
  | "reactance"
  | "impedance"
  | "other"
  | "unknown";

export interface Heading {
  text: string;
  role: Role;
  frequencyUnit: FrequencyUnit | null;
  angleUnit: "deg" | "rad" | null;
  /** Factor from the heading's unit to ohm or to 1: 1000 for kΩ, 0.01 for %. */
  scale: number;
  /** "s11", "s21", … or "z"; null where the heading names none. */
  parameter: string | null;
  /** The heading says that the value has no sign (|X|). */
  unsigned: boolean;
}

/** Words in English, German, French, Spanish, Italian and Dutch, without accents, in lower case. */
const WORDS: [Role, RegExp][] = [
  [
    "other",
    /\b(?:reflected power|reflektierte leistung|rucklaufende leistung|puissance reflechie|potencia reflejada|potenza riflessa|gereflecteerd vermogen)\b/,
  ],
  [
    "other",
    /\b(?:time|date|datum|zeit|uhrzeit|heure|hora|fecha|ora|tijd|timestamp|index|idx|punkt|point|points|no|nr|num|nummer)\b/,
  ],
  [
    "other",
    /\b(?:rbw|ifbw|vbw|noise|rauschen|limit|grenzwert|marker|temp|temperature?|mismatch|delay|group|laufzeit|fehlanpassung\w*verlust)\b/,
  ],
  [
    "other",
    /\b(?:rp|xp|ls|lp|cs|cp|q|ind(?:uctance|uktivitat)?|cap(?:acitance|azitat)?|kapazitat|induktivitat)\b/,
  ],
  [
    "frequency",
    /\b(?:freq\w*|freque\w*|frekvens|frequenz\w*|frecuencia\w*|frec|frequenz[ae]|messfrequenz|f)\b/,
  ],
  [
    "swr",
    /\b(?:v ?swr|s ?w ?[rv]|swv|vswv|s\.w\.r\.?|ros|r\.o\.s\.?|roe|r\.o\.e\.?|tos|t\.o\.s\.?|coe|sgv|swg|swr\d*|stehwelle\w*|stehwellenverhaltnis|welligkeit\w*|standing wave\w*|staande ?golf\w*)\b/,
  ],
  [
    "swr",
    /(?:rapport|taux|relacion|razon|coeficiente|rapporto|ratio|verhouding)[ a-z']*(?:d' ?ondes?|ondas?|onde|standing)/,
  ],
  ["swr", /\b(?:ondes? stationnaires?|ondas? estacionarias?|onde stazionarie)\b/],
  [
    "return-loss",
    /\b(?:ret(?:urn)? ?loss(?:es)?|returnloss|rl|rl\d{1,2}|r\.l\.|ruckfl?uss?\w*|rueckfl?uss?\w*|rucklauf\w*|reflexionsdamp\w*|reflexionsdaemp\w*|anpassung\w*|retour(?:verlies|demping)\w*|reflectie(?:verlies|demping)\w*|aanpassing)\b/,
  ],
  [
    "return-loss",
    /\b(?:pertes?|perdidas?|perdit[ae]|attenuation|affaiblissement|atenuacion|attenuazione)\b[ a-z'()]*\b(?:retour|retorno|ritorno|reflexion|riflessione|adaptation|adaptacion)\b/,
  ],
  ["return-loss", /\breflect(?:ion|ed)? loss\b/],
  [
    "angle",
    /\b(?:phase\w*|phas|ph|ang|angle|winkel|phasenwinkel|hoek|fasehoek|fase|angolo|angulo|arg|argument|theta|phi|deg|degrees?|grad|rad|gradi|graden|degres|grados)\b/,
  ],
  ["real", /\b(?:re|real|realteil|reele?|reelle|reale|reel deel|wirkanteil)\b/],
  [
    "imaginary",
    /\b(?:im|imag|imaginary|imaginarteil|imaginaerteil|imaginaire|imaginari[ao]|immaginari[ao]|imaginair|blindanteil)\b/,
  ],
  [
    "resistance",
    /\b(?:rs|resistance|resistanz|wirkwiderstand|resistencia|resistenza|weerstand|widerstand|rz)\b/,
  ],
  ["reactance", /\b(?:xs|reactance|reaktanz|blindwiderstand|reactancia|reattanza|reactantie|xz)\b/],
  ["impedance", /\b(?:z|impedance|impedanz|scheinwiderstand|impedancia|impedenza|impedantie|zmag)\b/],
];
const REFLECTION =
  /\b(?:s ?1 ?1|s ?2 ?2|s ?3 ?3|s ?4 ?4|gamma|rho|refl\w*|reflexion\w*|reflexions?faktor|riflessione|reflectie\w*)\b/;
const LEVEL =
  /\b(?:level|pegel|niveau|nivel|livello|power|leistung|puissance|potencia|potenza|vermogen|trace|spur|courbe|traza|traccia|trc\d*|tr\d|max ?hold|min ?hold|amplitude|amplitud|ampiezza|clear ?write|average|signal|magnitude|mag|output|detector)\b/;
const MAGNITUDE =
  /\b(?:mag|magnitude|magnitud|betrag|modul[eo]|modulus|module|lin|linear|abs|amplitude|mg|ma)\b|\|/;
const LOG = /\bdb\b|\blog\b|\blog ?mag\b|\blogm\b|\blg ?mag\b/;

/** Reads one column heading in any of six languages. Never fails: what it does not know is "unknown". */
export function readHeading(raw: string): Heading {
  const text = plain(raw);
  const frequencyUnit = frequencyUnitOf(text);
  const angleUnit = /\brad(?:ian\w*)?\b/.test(text)
    ? "rad"
    : /\b(?:deg|degrees?|grad|gradi|graden|degres|grados)\b/.test(text)
      ? "deg"
      : null;
  const heading: Heading = {
    text: raw.trim(),
    role: "unknown",
    frequencyUnit,
    angleUnit,
    scale: /\b(?:kohms?|k ohms?)\b/.test(text)
      ? 1000
      : /\bmohms?\b/.test(text)
        ? 1e-3
        : /%|\bprozent\b|\bpercent\b/.test(text)
          ? 0.01
          : 1,
    parameter: parameterOf(text),
    unsigned: /\|\s*xs?\s*\||\babs x\b|abs\(x/.test(text),
  };
  heading.role = roleOf(text, heading);
  return heading;
}

/** The frequency unit that a text names, null where it names none. */
export function frequencyUnitOf(plainText: string): FrequencyUnit | null {
  const match = plainText.match(/(?:\b|_|\d)([kmg]?)hz\b/);
  if (!match) return null;
  return ({ "": "Hz", k: "kHz", m: "MHz", g: "GHz" } as const)[match[1] as "" | "k" | "m" | "g"];
}

/** Lower case, no accents, symbols as words, run-together words parted. */
export function plain(raw: string): string {
  return raw
    .replace(/([kKmMgG]?)[hH][zZ]/g, (_, k: string) => ` ${k.toLowerCase()}hz `)
    .replace(/[dD][bB](m|uV|µV|μV|mV|i|c)?(?![a-z])/g, (_, m?: string) => ` db${m ? m.toLowerCase() : ""} `)
    .replace(/([kKmM]?)\s?(?:[Oo]hms?|OHMS?|\u2126|\u03a9)/g, (_, k: string) => ` ${k.toLowerCase()}ohm `)
    .replace(/([a-z])([A-Z])/g, "$1 $2")
    .normalize("NFD")
    .replace(/[\u0300-\u036f]/g, "")
    .toLowerCase()
    .replace(/ß/g, "ss")
    .replace(/°/g, " deg ")
    .replace(/\u03b3/g, " gamma ")
    .replace(/\u03c1/g, " rho ")
    .replace(/[\u03c6\u03d5]/g, " phi ")
    .replace(/\u03b8/g, " theta ")
    .replace(/∠/g, " angle ")
    .replace(/[’‘`]/g, "'")
    .replace(/[_[\](){}:=/\\,"-]/g, " ")
    .replace(/\.(?=\s|$)|(?<=\w{2})\./g, " ")
    .replace(/\s+/g, " ")
    .trim();
}

function parameterOf(text: string): string | null {
  const s = text.match(/\bs ?([1-9]) ?([1-9])\b/);
  if (s) return `s${s[1]}${s[2]}`;
  if (/\b(?:z|z ?1 ?1|ohms?|kohms?|impedan\w*|impeden\w*|zin|scheinwiderstand)\b/.test(text)) return "z";
  return null;
}

function roleOf(text: string, { frequencyUnit, parameter }: Heading): Role {
  if (text === "") return "unknown";
  if (/^[#n]$/.test(text)) return "other";
  const db = LOG.test(text);
  const dbm = /\bdb(?:m|uv|mv|µv|c)\b/.test(text);
  for (const [role, words] of WORDS) {
    if (!words.test(text)) continue;
    if (role === "real" && parameter === "z") return "resistance";
    if (role === "imaginary" && parameter === "z") return "reactance";
    if (role === "angle" && db) continue;
    if (role === "angle" && frequencyUnit !== null) continue;
    if (role === "other" && frequencyUnit !== null && /\bfreq/.test(text)) return "frequency";
    if (role === "return-loss" && dbm) return "level";
    return role;
  }
  if (frequencyUnit !== null) return "frequency";
  if (parameter !== null && /^s(?:12|21|31|13|32|23)$/.test(parameter)) return db ? "level" : "other";
  if (dbm) return "level";
  if (parameter === "z")
    return /\bx\b/.test(text) ? "reactance" : /\br\b/.test(text) ? "resistance" : "unknown";
  if (REFLECTION.test(text))
    return db
      ? "s11-db"
      : MAGNITUDE.test(text) || /\b(?:gamma|rho)\b|%/.test(text)
        ? "magnitude"
        : "reflection";
  if (text === "r") return "resistance";
  if (text === "x" || text === "|x|") return "reactance";
  if (/\|\s*z\s*\|/.test(text)) return "impedance";
  if (db) return "decibel";
  if (LEVEL.test(text)) return MAGNITUDE.test(text) ? "unknown" : "decibel";
  return MAGNITUDE.test(text) ? "magnitude" : "unknown";
}
