import { expect, test } from "vitest";
import { onPage } from "../../app/charts/on-page.ts";

test("colours and fonts of paper become the page's own", () => {
  expect(onPage('<path fill="#1E2A2B" stroke="#1f6f63" d="M0 0"/>')).toBe(
    '<path fill="var(--color-ink)" stroke="var(--color-fen)" d="M0 0"/>',
  );
  expect(onPage('<text font-family="Sometype Mono, monospace">1</text>')).toBe(
    '<text font-family="var(--font-mono)">1</text>',
  );
});

test("what is not of the palette, and words, are left alone", () => {
  const svg = '<text fill="none" stroke="#123456" aria-label="fill">fill=#1e2a2b</text>';
  expect(onPage(svg)).toBe(svg);
});
