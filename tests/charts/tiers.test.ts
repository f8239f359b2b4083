import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { assignTiers } from "../../app/charts/tiers.ts";

const label = fc.record({
  fraction: fc.double({ min: 0, max: 1, noNaN: true }),
  widthPx: fc.double({ min: 5, max: 80, noNaN: true }),
  priority: fc.integer({ min: 0, max: 3 }),
});

describe("assignTiers", () => {
  it("shows the more important of two that collide, and the other once there is room", () => {
    const labels = [
      { fraction: 0.5, widthPx: 40, priority: 1 },
      { fraction: 0.55, widthPx: 40, priority: 0 },
    ];
    expect(assignTiers(labels, [300, 600, 1200])).toEqual([2, 0]);
    expect(assignTiers(labels, [300])).toEqual([null, 0]);
  });

  it("never shows two that overlap, at any tier", () => {
    fc.assert(
      fc.property(fc.array(label, { maxLength: 30 }), (labels) => {
        const widths = [240, 568, 928];
        const tiers = assignTiers(labels, widths);
        for (const [tier, widthPx] of widths.entries()) {
          const shown = labels.filter((_, index) => (tiers[index] ?? 9) <= tier);
          for (const a of shown) {
            for (const b of shown) {
              if (a === b) continue;
              const apart = Math.abs(a.fraction - b.fraction) * widthPx;
              expect(apart).toBeGreaterThanOrEqual((a.widthPx + b.widthPx) / 2);
            }
          }
        }
      }),
    );
  });
});
