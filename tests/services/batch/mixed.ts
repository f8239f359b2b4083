import { execFileSync } from "node:child_process";

/** Invented files of a batch, and ZIPs of them made by another program. */

export interface Entry {
  name: string;
  text?: string;
  /** Of zeros, instead of a text. */
  zeros?: number;
  /** A link to another place, by its Unix mode. */
  link?: boolean;
  /** A ZIP with this one entry. */
  nested?: boolean;
}

/** A resonance at `mhz`, 201 points from 1 to 30 MHz, S11 in dB: invented. */
export function sweepText(mhz: number): string {
  const lines = ["Frequency (MHz),S11 (dB)"];
  for (let i = 0; i <= 200; i++) {
    const at = 1 + (29 * i) / 200;
    lines.push(`${at.toFixed(4)},${(-0.3 - 20 / (1 + (12 * (at / mhz - mhz / at)) ** 2)).toFixed(4)}`);
  }
  return `${lines.join("\n")}\n`;
}

/** Python's zipfile writes names as they are given, climbing ones too. */
export function zipOf(entries: Entry[]): Uint8Array {
  return new Uint8Array(
    execFileSync("/usr/bin/python3", ["-W", "ignore", "-c", SCRIPT], {
      input: JSON.stringify(entries),
      maxBuffer: 1e8,
    }),
  );
}

const SCRIPT = `
import io, json, sys, zipfile
out = io.BytesIO()
with zipfile.ZipFile(out, "w", zipfile.ZIP_DEFLATED) as z:
    for e in json.load(sys.stdin):
        info = zipfile.ZipInfo(e["name"]); info.compress_type = zipfile.ZIP_DEFLATED
        body = e.get("text", "").encode()
        if e.get("zeros"): body = bytes(e["zeros"])
        if e.get("link"): info.external_attr = 0o120777 << 16
        if e.get("nested"):
            inner = io.BytesIO()
            with zipfile.ZipFile(inner, "w") as n: n.writestr("a.csv", body)
            body = inner.getvalue()
        z.writestr(info, body)
sys.stdout.buffer.write(out.getvalue())
`;
