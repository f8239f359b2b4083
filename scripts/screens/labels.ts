import type { Content } from "./picture.ts";
import type { Random } from "./random.ts";
import type { Mark } from "./scene.ts";

/** What is printed around a plot: its value axis and its frequency axis, in the manners that instruments have. */

export interface Place {
  left: number;
  top: number;
  right: number;
  bottom: number;
}

export type TextMaker = (
  x: number,
  y: number,
  words: string,
  align: "start" | "middle" | "end",
  turned?: boolean,
) => Mark;

export function labelMarks(
  random: Random,
  content: Content,
  at: Place,
  columns: number | null,
  size: number,
  text: TextMaker,
  marks: Mark[],
): string {
  const { scale, sweep } = content;
  const manner =
    scale.quantity === "swr" || scale.quantity === "return_loss_up" || random.chance(0.5)
      ? "labels"
      : random.pick(["reference", "both"]);
  const perRow = (scale.top - scale.bottom) / scale.rows;
  if (manner !== "reference") {
    const digits = Number.isInteger(perRow) && Number.isInteger(scale.bottom) ? 0 : 1;
    const every = random.pick([1, 1, scale.rows % 2 === 0 ? 2 : 1]);
    for (let i = 0; i <= scale.rows; i += every) {
      const y = at.top + (i * (at.bottom - at.top)) / scale.rows;
      marks.push(
        text(at.left - size * 0.45, y + size * 0.36, (scale.top - i * perRow).toFixed(digits), "end"),
      );
    }
  }
  const above = at.top - size * 0.7;
  const word = {
    swr: "SWR",
    return_loss_up: "Return loss dB",
    return_loss_down: "S11 dB",
    level: "Level dBm",
  }[scale.quantity];
  if (manner === "labels") {
    if (random.chance(0.5)) marks.push(text(size * 1.1, (at.top + at.bottom) / 2, word, "middle", true));
    else marks.push(text(at.left, above, word, "start"));
  } else {
    marks.push(text(at.left, above, `Ref ${scale.top.toFixed(2)} ${scale.unit}`, "start"));
    marks.push(text((at.left + at.right) / 2, above, `Scale ${Math.abs(perRow)} dB/div`, "middle"));
  }
  return frequencyMarks(random, sweep, at, columns, size, text, marks);
}

function frequencyMarks(
  random: Random,
  sweep: Content["sweep"],
  at: Place,
  columns: number | null,
  size: number,
  text: TextMaker,
  marks: Mark[],
): string {
  const below = at.bottom + size * 1.5;
  const digits = random.pick([3, 6]);
  const manner = sweep.scale === "log" ? "ticks" : random.pick(["start-stop", "centre-span", "ticks"]);
  const unit = (mhz: number) => `${mhz.toFixed(digits)} MHz`;
  if (manner === "start-stop") {
    marks.push(
      text(at.left, below, `Start ${unit(sweep.startMhz)}`, "start"),
      text(at.right, below, `Stop ${unit(sweep.stopMhz)}`, "end"),
    );
  } else if (manner === "centre-span") {
    const centre = (sweep.startMhz + sweep.stopMhz) / 2;
    const word = random.pick(["Centre", "Center"]);
    marks.push(
      text(at.left, below, `${word} ${unit(centre)}`, "start"),
      text(at.right, below, `Span ${unit(sweep.stopMhz - sweep.startMhz)}`, "end"),
    );
  } else if (sweep.scale === "log") {
    const decades = Math.round(Math.log10(sweep.stopMhz / sweep.startMhz));
    for (let d = 0; d < decades; d++) {
      for (const m of [1, 2, 5]) {
        const mhz = sweep.startMhz * 10 ** d * m;
        const x = at.left + (Math.log10(mhz / sweep.startMhz) / decades) * (at.right - at.left);
        marks.push(text(x, below, String(mhz), "middle"));
      }
    }
    marks.push(
      text(at.right, below, String(sweep.stopMhz), "middle"),
      text((at.left + at.right) / 2, below + size * 1.5, "Frequency, MHz (log)", "middle"),
    );
  } else {
    const count = columns && columns <= 8 ? columns : 5;
    for (let i = 0; i <= count; i++) {
      const mhz = sweep.startMhz + (i * (sweep.stopMhz - sweep.startMhz)) / count;
      marks.push(
        text(at.left + (i * (at.right - at.left)) / count, below, String(Number(mhz.toFixed(3))), "middle"),
      );
    }
    marks.push(text((at.left + at.right) / 2, below + size * 1.5, "Frequency (MHz)", "middle"));
  }
  if (manner !== "ticks" && random.chance(0.6))
    marks.push(
      text((at.left + at.right) / 2, below + size * 1.4, `RBW 10 kHz   Points ${sweep.mhz.length}`, "middle"),
    );
  return manner;
}
