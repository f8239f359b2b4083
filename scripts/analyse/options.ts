import type { AnalysisSettings, Quantity } from "../../app/measurement/sweep.ts";
import { DEFAULT_SETTINGS } from "../../app/measurement/sweep.ts";
import type { Given, ScreenshotSpec } from "../../app/readers/reading.ts";

export interface Options {
  files: string[];
  json: boolean;
  points: boolean;
  given: Given;
  settings: AnalysisSettings;
  /** Ω for which findings are given. */
  systemOhm: number;
}

export const USAGE = `Usage: npm run analyse -- FILE… [options]
  --json                  one JSON object a line, a file each
  --points                with the points: frequency and value in the quantity read (abs Γ, re and im for complex ones)
  --swr-limit S           limit of the bandwidth (2)
  --reference-ohm R       reference impedance of the findings (50), and of files that name none
  --zero-db DB            level that counts as full reflection
  --quantity Q            s11-db, return-loss, swr, level, gamma or impedance
Pictures:
  --start-hz F --stop-hz F --scale linear|log --top V --bottom V --trace-color #RRGGBB --frame L,T,R,B`;

/** A command line that can't be followed; the message says why. */
export class UsageError extends Error {}

const QUANTITIES = ["s11-db", "return-loss", "swr", "level", "gamma", "impedance"];
const LATER = ["--open", "--short", "--load", "--cable", "--length-m", "--velocity-factor"];

/** Parses the arguments of the command. Throws `UsageError`. */
export function parseOptions(args: string[]): Options {
  const options: Options = {
    files: [],
    json: false,
    points: false,
    given: {},
    settings: { ...DEFAULT_SETTINGS },
    systemOhm: 50,
  };
  const picture: ScreenshotSpec = {};
  const rest = [...args];
  for (let arg = rest.shift(); arg !== undefined; arg = rest.shift()) {
    if (arg === "--") options.files.push(...rest.splice(0));
    else if (!arg.startsWith("--")) options.files.push(arg);
    else if (arg === "--json") options.json = true;
    else if (arg === "--points") options.points = true;
    else {
      const [name, glued] = arg.split(/=(.*)/s);
      if (LATER.includes(name)) throw new UsageError(`${name}: correction is not available yet.`);
      if (!(name in VALUED)) throw new UsageError(`${name}: no such option.`);
      const value = glued ?? rest.shift();
      if (value === undefined) throw new UsageError(`${name}: a value is missing.`);
      VALUED[name](value, options, picture, name);
    }
  }
  if (options.files.length === 0) throw new UsageError("No file was named.");
  if (Object.keys(picture).length > 0) options.given.screenshot = picture;
  return options;
}

type Apply = (value: string, options: Options, picture: ScreenshotSpec, name: string) => void;

const VALUED: Record<string, Apply> = {
  "--swr-limit": (value, options, _picture, name) => {
    options.settings.swrLimit = number(value, name);
    if (!(options.settings.swrLimit > 1)) throw new UsageError(`${name}: expected a number over 1.`);
  },
  "--reference-ohm": (value, options, picture, name) => {
    const { given } = options;
    const referenceOhm = positive(value, name);
    options.systemOhm = referenceOhm;
    given.text = { ...given.text, referenceOhm };
    given.touchstone = { ...given.touchstone, referenceOhm };
    picture.referenceOhm = referenceOhm;
  },
  "--zero-db": (value, { given }, picture, name) => {
    const zeroDb = number(value, name);
    given.text = { ...given.text, zeroDb };
    picture.zeroDb = zeroDb;
  },
  "--quantity": (value, { given }, picture, name) => {
    given.quantity = oneOf(value, QUANTITIES, name) as Quantity;
    if (given.quantity !== "gamma" && given.quantity !== "impedance") picture.quantity = given.quantity;
  },
  "--start-hz": (value, _options, picture, name) => {
    picture.startHz = positive(value, name);
  },
  "--stop-hz": (value, _options, picture, name) => {
    picture.stopHz = positive(value, name);
  },
  "--scale": (value, _options, picture, name) => {
    picture.scale = oneOf(value, ["linear", "log"], name) as "linear" | "log";
  },
  "--top": (value, _options, picture, name) => {
    picture.top = number(value, name);
  },
  "--bottom": (value, _options, picture, name) => {
    picture.bottom = number(value, name);
  },
  "--trace-color": (value, _options, picture, name) => {
    if (!/^#?[0-9a-f]{6}$/i.test(value)) throw new UsageError(`${name}: expected a colour like #f0d828.`);
    picture.traceColor = `#${value.replace("#", "").toLowerCase()}`;
  },
  "--frame": (value, _options, picture, name) => {
    const [left, top, right, bottom, ...more] = value.split(",").map((part) => number(part, name));
    if (bottom === undefined || more.length > 0 || !(right > left && bottom > top))
      throw new UsageError(`${name}: expected left,top,right,bottom in pixels.`);
    picture.frame = { left, top, right, bottom };
  },
};

function number(text: string, name: string): number {
  const value = Number(text);
  if (text.trim() === "" || !Number.isFinite(value))
    throw new UsageError(`${name}: expected a number, found "${text}".`);
  return value;
}

function positive(text: string, name: string): number {
  const value = number(text, name);
  if (!(value > 0)) throw new UsageError(`${name}: expected a number over 0, found "${text}".`);
  return value;
}

function oneOf(text: string, choices: string[], name: string): string {
  if (!choices.includes(text))
    throw new UsageError(`${name}: expected ${choices.join(", ")}, found "${text}".`);
  return text;
}
