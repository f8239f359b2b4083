import { PAGE_PALETTE } from "./palette";

/** The unit of a frequency axis whose chart has no margin: under its right end. */
export function AxisUnit({ y, text }: { y: number; text: string }) {
  return (
    <text
      x="100%"
      y={y}
      textAnchor="end"
      fontFamily={PAGE_PALETTE.monoFont}
      fontSize="11.5"
      fill={PAGE_PALETTE.soft}
    >
      {text}
    </text>
  );
}
