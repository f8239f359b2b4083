/** Words on a plate, whose widths nobody measures: fonts may be missing where it is looked at, so lines are kept short. Pure. */

/** Breaks a text into lines of at most `widthPx`; a word that is longer alone is broken too. */
export function linesOf(text: string, widthPx: number, fontPx: number, most = 8): string[] {
  const room = Math.max(8, Math.floor(widthPx / (fontPx * CHARACTER_EM)));
  const lines: string[] = [];
  let line = "";
  for (const word of text
    .trim()
    .split(/[ \n\r\t]+/)
    .flatMap((one) => piecesOf(one, room))) {
    if (line !== "" && lengthOf(line) + 1 + lengthOf(word) > room) {
      lines.push(line);
      line = word;
    } else line = line === "" ? word : `${line} ${word}`;
  }
  if (line !== "") lines.push(line);
  if (lines.length <= most) return lines;
  const kept = lines.slice(0, most);
  kept[most - 1] = `${Array.from(kept[most - 1])
    .slice(0, room - 1)
    .join("")}…`;
  return kept;
}

/** a, b, … z, aa, ab, … */
export function letterOf(index: number): string {
  const last = String.fromCharCode(97 + (index % 26));
  return index < 26 ? last : letterOf(Math.floor(index / 26) - 1) + last;
}

function piecesOf(word: string, room: number): string[] {
  const characters = Array.from(word);
  const count = Math.max(1, Math.ceil(characters.length / room));
  return Array.from({ length: count }, (_, i) => characters.slice(i * room, (i + 1) * room).join(""));
}

function lengthOf(text: string): number {
  return Array.from(text).length;
}

/** A character's width as a share of the font's size, rather wide: the fallback may be wider than our own. */
const CHARACTER_EM = 0.56;
