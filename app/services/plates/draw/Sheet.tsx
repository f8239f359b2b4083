import type { ReactNode } from "react";
import type { Palette } from "../../../charts/palette.ts";
import { traceStyle } from "../../../charts/trace-styles.ts";
import type { KeyLine } from "./key.ts";
import { linesOf } from "./lettering.ts";
import { n } from "./marks.tsx";

interface SheetProps {
  widthPx: number;
  palette: Palette;
  /** "Plate 3"; empty where it has no number yet. */
  number: string;
  /** Empty: no head at all. */
  title: string;
  /** For those who do not see it. */
  description: string;
  key_: readonly KeyLine[];
  /** In small type at the foot. */
  provenance: string;
  figureHeightPx: number;
  /** Drawn from the plot's top left. */
  figure: ReactNode;
}

/** The sheet of an old atlas: a ruled border, number and title, the figure, what its letters stand for, and where it is from. */
export function Sheet(props: SheetProps) {
  const { widthPx, palette, number, title, description, provenance, figureHeightPx, figure } = props;
  const pad = padOf(widthPx);
  const inner = widthPx - 2 * pad;
  const titlePx = widthPx < NARROW_PX ? 18 : 24;
  const titles = title === "" ? [] : linesOf(title, inner, titlePx, 4);
  const headPx = titles.length === 0 ? 10 : (number ? 26 : 6) + titles.length * titlePx * 1.25 + 12;
  const keyTop = pad + headPx + figureHeightPx;
  const key = keyRows(props.key_, inner, widthPx);
  const footTop = keyTop + key.heightPx + 10;
  const foot = linesOf(provenance, inner, FOOT_FONT_PX, 5);
  const heightPx = Math.ceil(footTop + 12 + foot.length * 15 + pad);
  return (
    <svg
      xmlns="http://www.w3.org/2000/svg"
      width={widthPx}
      height={heightPx}
      viewBox={`0 0 ${widthPx} ${heightPx}`}
      role="img"
    >
      <title>{[number, title].filter(Boolean).join(": ")}</title>
      <desc>{description}</desc>
      <rect width={widthPx} height={heightPx} fill={palette.paper} />
      <Border {...{ widthPx, heightPx, palette }} />
      <g textAnchor="middle">
        {titles.length > 0 && number && (
          <text
            x={widthPx / 2}
            y={pad + 12}
            fontFamily={palette.sansFont}
            fontSize="13"
            letterSpacing="2"
            fill={palette.fen}
          >
            {number.toUpperCase()}
          </text>
        )}
        {titles.map((line, i) => (
          <text
            key={line}
            x={widthPx / 2}
            y={n(pad + (number ? 26 : 6) + titlePx * (0.9 + i * 1.25))}
            fontFamily={palette.displayFont}
            fontSize={titlePx}
            fontWeight="600"
            fill={palette.ink}
          >
            {line}
          </text>
        ))}
      </g>
      <g transform={`translate(${pad + VALUES_PX} ${n(pad + headPx)})`}>{figure}</g>
      <g transform={`translate(${pad} ${n(keyTop)})`}>
        {key.rows.map((row) => (
          <KeyRow key={`${row.line.letter} ${row.x} ${row.y}`} row={row} palette={palette} />
        ))}
      </g>
      <line x1={pad} x2={widthPx - pad} y1={n(footTop)} y2={n(footTop)} stroke={palette.rule} />
      <g fontFamily={palette.sansFont} fontSize={FOOT_FONT_PX} fill={palette.soft}>
        {foot.map((line, i) => (
          <text key={line} x={pad} y={n(footTop + 18 + i * 15)}>
            {line}
          </text>
        ))}
      </g>
    </svg>
  );
}

/** Room for the plot itself. */
export function plotWidthOf(widthPx: number): number {
  return widthPx - 2 * padOf(widthPx) - VALUES_PX - RIGHT_PX;
}

export const NARROW_PX = 560;

function padOf(widthPx: number): number {
  return widthPx < NARROW_PX ? 22 : 40;
}

/** Two rules, the outer one heavier. */
function Border({ widthPx, heightPx, palette }: { widthPx: number; heightPx: number; palette: Palette }) {
  const rule = (inset: number, weight: number) => (
    <rect
      x={inset}
      y={inset}
      width={widthPx - 2 * inset}
      height={heightPx - 2 * inset}
      fill="none"
      stroke={palette.edge}
      strokeWidth={weight}
    />
  );
  const narrow = widthPx < NARROW_PX;
  return (
    <g>
      {rule(narrow ? 6 : 12, 2)}
      {rule(narrow ? 11 : 18, 0.75)}
    </g>
  );
}

interface PlacedLine {
  line: KeyLine;
  lines: string[];
  x: number;
  y: number;
}

/** One under the other; a line that is long goes on under itself. */
function keyRows(key: readonly KeyLine[], inner: number, widthPx: number) {
  const fontPx = widthPx < NARROW_PX ? 13 : 14;
  let y = 8;
  const rows = key.map((line): PlacedLine => {
    const x = line.style === null ? LETTER_PX : LETTER_PX + SAMPLE_PX;
    const lines = linesOf(line.text, inner - x, fontPx, 4);
    const placed = { line, lines, x, y };
    y += lines.length * LINE_PX + 3;
    return placed;
  });
  return { rows, heightPx: key.length === 0 ? 0 : y };
}

function KeyRow({ row: { line, lines, x, y }, palette }: { row: PlacedLine; palette: Palette }) {
  const style = line.style === null ? null : traceStyle(line.style, palette);
  const at = y + LINE_PX - 5;
  return (
    <g fontFamily={palette.sansFont} fontSize="14" fill={palette.ink}>
      {line.letter !== "" && (
        <text x="0" y={n(at)} fontWeight="700" fill={style?.colour ?? palette.heather}>
          {line.letter}
        </text>
      )}
      {style && (
        <line
          x1={LETTER_PX}
          x2={LETTER_PX + SAMPLE_PX - 10}
          y1={n(at - 4)}
          y2={n(at - 4)}
          stroke={style.colour}
          strokeWidth="2"
          strokeDasharray={style.dash}
        />
      )}
      {lines.map((text, i) => (
        <text key={text} x={x} y={n(at + i * LINE_PX)}>
          {text}
        </text>
      ))}
    </g>
  );
}

/** Left of the plot, for its values, and right of it, for the letters of lines. */
const VALUES_PX = 56;
const RIGHT_PX = 16;
const LETTER_PX = 24;
const SAMPLE_PX = 54;
const LINE_PX = 19;
const FOOT_FONT_PX = 11.5;
