import { execFileSync } from "node:child_process";
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { type Content, type Truth, truthOf } from "./picture.ts";
import type { Random } from "./random.ts";
import { pickSkin } from "./skins.ts";

/** Draws a chart with gnuplot (package `gnuplot-nox`); its own axes, tics and key. */
export function drawWithGnuplot(
  random: Random,
  content: Content,
  name: string,
): { png: Buffer; truth: Truth } {
  const { sweep, scale, values } = content;
  const skin = pickSkin(random);
  const [width, height] = random.pick([
    [640, 480],
    [800, 600],
    [960, 540],
    [1200, 800],
  ] as const);
  const box = {
    left: Math.round(width * 0.13),
    right: Math.round(width * 0.95),
    top: Math.round(height * 0.1),
    bottom: Math.round(height * 0.86),
  };
  const folder = mkdtempSync(join(tmpdir(), "swale-plot-"));
  try {
    writeFileSync(join(folder, "data"), sweep.mhz.map((f, i) => `${f} ${values[i]}`).join("\n"));
    const word = {
      swr: "SWR",
      return_loss_up: "Return loss (dB)",
      return_loss_down: "S11 (dB)",
      level: "Level (dBm)",
    }[scale.quantity];
    const size = Math.round(Math.max(9, height / 52));
    const plain = sweep.stopMhz - sweep.startMhz;
    const grid = random.pick(["solid", "dotted", "none"]);
    const lines = [
      `set terminal pngcairo size ${width},${height} font "${skin.font},${size}" background rgb "${skin.inner}"`,
      `set output "${join(folder, "out.png")}"`,
      `set lmargin at screen ${box.left / width}`,
      `set rmargin at screen ${box.right / width}`,
      `set tmargin at screen ${1 - box.top / height}`,
      `set bmargin at screen ${1 - box.bottom / height}`,
      `set border 31 lc rgb "${skin.outline}" lw ${random.pick([1, 1, 2])}`,
      sweep.scale === "log"
        ? `set logscale x; set format x "${random.pick(["10^{%T}", "%g"])}"`
        : `set xtics ${plain / 5}`,
      `set ytics ${Math.abs(scale.top - scale.bottom) / scale.rows}`,
      `set xtics textcolor rgb "${skin.ink}"; set ytics textcolor rgb "${skin.ink}"`,
      grid === "none" ? "" : `set grid lc rgb "${skin.grid}" lw 1 ${grid === "dotted" ? "dt 3" : "lt 1"}`,
      `set xrange [${sweep.startMhz}:${sweep.stopMhz}]`,
      `set yrange [${scale.bottom}:${scale.top}]`,
      `set xlabel "${random.pick(["Frequency (MHz)", "MHz"])}" textcolor rgb "${skin.ink}"`,
      `set ylabel "${word}" textcolor rgb "${skin.ink}"`,
      random.chance(0.4) ? `set key top right textcolor rgb "${skin.ink}"` : "unset key",
      random.chance(0.3) ? `set title "Wire over the shed" textcolor rgb "${skin.ink}"` : "",
      random.chance(0.25)
        ? `set arrow from graph 0,0.5 to graph 1,0.5 nohead lc rgb "${skin.second}" dt 2`
        : "",
      `plot "${join(folder, "data")}" with lines lc rgb "${skin.trace}" lw ${random.pick([1, 1.5, 2, 3])} title "sweep"`,
    ];
    writeFileSync(join(folder, "script"), lines.join("\n"));
    execFileSync("gnuplot", [join(folder, "script")], { stdio: "pipe" });
    const truth = truthOf(
      content,
      {
        name,
        skin: `gnuplot-${skin.name}`,
        size: [width, height],
        printed: "ticks",
        color: skin.trace,
        columns: null,
      },
      box,
    );
    return { png: readFileSync(join(folder, "out.png")), truth };
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}
