import type { ReactNode } from "react";

/** Tiny drawings for empty places: a fine pen on paper. */

export function LostDrawing() {
  return (
    <Paper>
      <Land d="M4 30H40C52 30 48 30 60 30H116V66H4Z" line="M4 30H48M72 30H116" />
      <path d="M48 30c3 0 4 2 6 2m12 0c2 0 3-2 6-2" {...DASHED} />
      <path d="M60 54V38m0 0 9 3-9 4" {...PEN} />
    </Paper>
  );
}

export const DRAWINGS = {
  sweeps: () => (
    <Paper>
      <Land
        d="M4 22H44C58 22 54 56 60 56S62 22 76 22H116V66H4Z"
        line="M4 22H44C58 22 54 56 60 56S62 22 76 22H116"
      />
      <path d="M60 4v20m-6-6 6 6 6-6" {...ACCENT} />
    </Paper>
  ),
  benches: () => (
    <Paper>
      <Land d="M4 54H116V66H4Z" line="M4 54H116" />
      <path d="M34 54V34h52v20M34 40H14m72 0h20M60 34V16m-5 0h10" {...PEN} />
      <path d="M48 44h24m-18-4-6 4 6 4m12-8 6 4-6 4" {...ACCENT} />
    </Paper>
  ),
  dips: () => (
    <Paper>
      <Land d="M4 28C30 25 44 31 60 28S96 26 116 28V66H4Z" line="M4 28C30 25 44 31 60 28S96 26 116 28" />
      <path d="M50 14a10 10 0 1 0 20 0 10 10 0 1 0-20 0m17 7 7 7" {...ACCENT} />
    </Paper>
  ),
  notes: () => (
    <Paper>
      <Land
        d="M4 20H44C58 20 54 52 60 52S62 20 76 20H116V66H4Z"
        line="M4 20H44C58 20 54 52 60 52S62 20 76 20H116"
      />
      <g fill="none" stroke="var(--color-heather)" strokeWidth="1.5" strokeDasharray="3 2">
        <ellipse cx="60" cy="40" rx="8" ry="3.6" />
        <ellipse cx="60.6" cy="32.6" rx="6" ry="3.1" />
        <ellipse cx="59.6" cy="26.6" rx="4" ry="2.4" />
      </g>
    </Paper>
  ),
  steps: () => (
    <Paper>
      <Land d="M4 54H116V66H4Z" line="M4 54H116" />
      <path d="M40 54V12M80 54V24" {...PEN} />
      <path d="M80 12v9m-4-4.5h8" {...DASHED} />
      <path d="M50 32h18m-5-5 5 5-5 5" {...ACCENT} />
    </Paper>
  ),
  plates: () => (
    <Paper>
      <path d="M26 6H94V64H26ZM31 11H89V59H31Z" {...PEN} fill="var(--color-surface)" />
      <Land
        d="M35 26H52C58 26 57 42 60 42S62 26 68 26H85V46H35Z"
        line="M35 26H52C58 26 57 42 60 42S62 26 68 26H85"
      />
      <path d="M42 53h36" {...ACCENT} />
    </Paper>
  ),
  projects: () => (
    <Paper>
      <Land d="M4 52H116V66H4Z" line="M4 52H116" />
      <path d="M60 52V10M60 14 34 52M60 14 86 52M54 10h12" {...PEN} />
      <path d="M96 24v14m-7-7h14" {...ACCENT} />
    </Paper>
  ),
  members: () => (
    <Paper>
      <Land d="M4 54H116V66H4Z" line="M4 54H116" />
      <path d="M44 26a7 7 0 1 0 0-.1zM36 54c0-12 6-16 15-16s15 4 15 16" {...PEN} />
      <path d="M86 30v16m-8-8h16" {...ACCENT} />
    </Paper>
  ),
  search: () => (
    <Paper>
      <Land
        d="M4 44H40C48 44 46 56 52 56S54 44 62 44H116V66H4Z"
        line="M4 44H40C48 44 46 56 52 56S54 44 62 44H116"
      />
      <path d="M70 22a11 11 0 1 0 22 0 11 11 0 1 0-22 0m19 8 9 9" {...ACCENT} />
    </Paper>
  ),
  tokens: () => (
    <Paper>
      <Land d="M4 56H116V66H4Z" line="M4 56H116" />
      <path d="M34 36a10 10 0 1 0 20 0 10 10 0 1 0-20 0m20 0h34v8m-9-8v6" {...ACCENT} />
    </Paper>
  ),
};

export type DrawingName = keyof typeof DRAWINGS;

const PEN = {
  fill: "none",
  stroke: "var(--color-ink)",
  strokeWidth: 1.5,
  strokeLinecap: "round",
  strokeLinejoin: "round",
} as const;
const ACCENT = { ...PEN, stroke: "var(--color-fen)", strokeWidth: 1.8 } as const;
const DASHED = { ...PEN, strokeDasharray: "2 3" } as const;

function Paper({ children }: { children: ReactNode }) {
  return (
    <svg width="120" height="70" viewBox="0 0 120 70" aria-hidden="true" className="drawing">
      {children}
    </svg>
  );
}

function Land({ d, line }: { d: string; line: string }) {
  return (
    <>
      <path d={d} fill="var(--color-land)" />
      <path d={line} {...PEN} />
    </>
  );
}
