import { CABLES, cableNamed } from "../../app/measurement/cables.ts";
import type { AnalysisSettings, Quantity } from "../../app/measurement/sweep.ts";
import { DEFAULT_SETTINGS } from "../../app/measurement/sweep.ts";
import type { Given, ScreenshotSpec } from "../../app/readers/reading.ts";

/** What brings a sweep to the port or to the antenna. */
export interface CorrectionOptions {
  /** Paths of the reference sweeps. */
  references: { open?: string; short?: string; load?: string };
  /** dB; null where nothing is known of the load. */
  loadReturnLossDb: number | null;
  line: {
    name: string;
    k1: number;
    k2: number;
    lengthM: number;
    /** Null where neither the cable's entry nor the command gives it. */
    velocityFactor: number | null;
  } | null;
}

export interface Options {
  files: string[];
  json: boolean;
  points: boolean;
  given: Given;
  settings: AnalysisSettings;
  /** Ω for which findings are given. */
  systemOhm: number;
  /** Null where no option asks for a correction. */
  correction: CorrectionOptions | null;
}

export const USAGE = `Usage: npm run analyse -- FILE… [options]
  --json                  one JSON object a line, a file each
  --points                with the points: frequency and value in the quantity read (abs Γ, re and im for complex ones)
  --swr-limit S           limit of the bandwidth (2)
  --reference-ohm R       reference impedance of the findings (50), and of files that name none
  --zero-db DB            level that counts as full reflection
  --quantity Q            s11-db, return-loss, swr, level, gamma or impedance
Correction (references are levels or complex, as the file is; nothing is extrapolated beyond them):
  --open F --short F --load F    sweeps of the port open, shorted and with a load
  --load-return-loss DB          what the load itself is known to have
  --cable NAME|k1,k2 --length-m L [--velocity-factor V]
                                 feedline to take out; k1, k2 in dB per metre: k1·√f + k2·f, f in MHz
Pictures:
  --start-hz F --stop-hz F --scale linear|log --top V --bottom V --trace-color #RRGGBB --frame L,T,R,B`;

/** A command line that can't be followed; the message says why. */
export class UsageError extends Error {}

const QUANTITIES = ["s11-db", "return-loss", "swr", "level", "gamma", "impedance"];

/** Parses the arguments of the command. Throws `UsageError`. */
export function parseOptions(args: string[]): Options {
  const options: Options = {
    files: [],
    json: false,
    points: false,
    given: {},
    settings: { ...DEFAULT_SETTINGS },
    systemOhm: 50,
    correction: null,
  };
  const bench: CorrectionOptions = { references: {}, loadReturnLossDb: null, line: null };
  const line: LineOptions = {};
  const picture: ScreenshotSpec = {};
  const rest = [...args];
  for (let arg = rest.shift(); arg !== undefined; arg = rest.shift()) {
    if (arg === "--") options.files.push(...rest.splice(0));
    else if (!arg.startsWith("--")) options.files.push(arg);
    else if (arg === "--json") options.json = true;
    else if (arg === "--points") options.points = true;
    else {
      const [name, glued] = arg.split(/=(.*)/s);
      if (!(name in VALUED) && !(name in CORRECTING)) throw new UsageError(`${name}: no such option.`);
      const value = glued ?? rest.shift();
      if (value === undefined) throw new UsageError(`${name}: a value is missing.`);
      if (name in CORRECTING) CORRECTING[name](value, bench, line, name);
      else VALUED[name](value, options, picture, name);
    }
  }
  if (options.files.length === 0) throw new UsageError("No file was named.");
  bench.line = lineOf(line);
  if (bench.line || Object.keys(bench.references).length > 0) options.correction = bench;
  else if (bench.loadReturnLossDb !== null) throw new UsageError("--load-return-loss: needs --load.");
  if (Object.keys(picture).length > 0) options.given.screenshot = picture;
  return options;
}

interface LineOptions {
  cable?: string;
  lengthM?: number;
  velocityFactor?: number;
}

/** The feedline that was named. A cable of the table brings its velocity factor; own k1 and k2 may go without. */
function lineOf({ cable, lengthM, velocityFactor }: LineOptions): CorrectionOptions["line"] {
  if (cable === undefined) {
    if (lengthM === undefined && velocityFactor === undefined) return null;
    throw new UsageError("--length-m and --velocity-factor need --cable.");
  }
  if (lengthM === undefined) throw new UsageError("--cable: needs --length-m.");
  const entry = cableNamed(cable);
  if (entry) {
    const { name, k1, k2 } = entry;
    return { name, k1, k2, lengthM, velocityFactor: velocityFactor ?? entry.velocityFactor };
  }
  const [k1, k2, ...more] = cable.split(",").map((part) => (part.trim() === "" ? Number.NaN : Number(part)));
  if (k2 === undefined || more.length > 0 || !(k1 >= 0 && k2 >= 0 && Number.isFinite(k1 + k2)))
    throw new UsageError(
      `--cable: expected k1,k2 in dB per metre or one of ${CABLES.map(({ name }) => name).join("; ")}. Found "${cable}".`,
    );
  return { name: "own values", k1, k2, lengthM, velocityFactor: velocityFactor ?? null };
}

type Correct = (value: string, bench: CorrectionOptions, line: LineOptions, name: string) => void;

const CORRECTING: Record<string, Correct> = {
  "--open": (value, { references }) => {
    references.open = value;
  },
  "--short": (value, { references }) => {
    references.short = value;
  },
  "--load": (value, { references }) => {
    references.load = value;
  },
  "--load-return-loss": (value, bench, _line, name) => {
    bench.loadReturnLossDb = positive(value, name);
  },
  "--cable": (value, _bench, line) => {
    line.cable = value;
  },
  "--length-m": (value, _bench, line, name) => {
    line.lengthM = number(value, name);
    if (line.lengthM < 0) throw new UsageError(`${name}: expected a length in metres, found "${value}".`);
  },
  "--velocity-factor": (value, _bench, line, name) => {
    line.velocityFactor = positive(value, name);
    if (line.velocityFactor > 1)
      throw new UsageError(`${name}: expected a factor up to 1, found "${value}".`);
  },
};

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
