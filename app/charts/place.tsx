import type { ReactNode } from "react";

/** How far across: a share of the width on a page, px at a fixed width. */
export function across(fraction: number, plotWidthPx: number | null): string | number {
  return plotWidthPx === null ? `${round(fraction * 100, 3)}%` : round(fraction * plotWidthPx, 2);
}

export function round(value: number, decimals: number): number {
  const factor = 10 ** decimals;
  return Math.round(value * factor) / factor;
}

interface AtProps {
  fraction: number;
  y: number;
  plotWidthPx: number | null;
  className?: string;
  children: ReactNode;
}

/** Puts its children's origin at a place of the plot; they are then drawn in px whatever the width. */
export function At({ fraction, y, plotWidthPx, className, children }: AtProps) {
  return (
    // biome-ignore lint/a11y/noSvgWithoutTitle: a place inside a drawing, named by the whole
    <svg
      x={across(fraction, plotWidthPx)}
      y={round(y, 2)}
      width="1"
      height="1"
      overflow="visible"
      className={className}
    >
      {children}
    </svg>
  );
}

interface StretchedProps {
  width: number;
  height: number;
  plotWidthPx: number | null;
  y?: number;
  children: ReactNode;
}

/** A box whose paths stretch with the width while their lines keep their weight. */
export function Stretched({ width, height, plotWidthPx, y = 0, children }: StretchedProps) {
  return (
    // biome-ignore lint/a11y/noSvgWithoutTitle: a box inside a drawing, named by the whole
    <svg
      x="0"
      y={y}
      width={plotWidthPx ?? "100%"}
      height={height}
      viewBox={`0 0 ${round(width, 2)} ${height}`}
      preserveAspectRatio="none"
      overflow="visible"
    >
      {children}
    </svg>
  );
}
