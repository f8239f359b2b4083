import { useSyncExternalStore } from "react";
import { PAPER_PALETTE, type Palette, PEAT_PALETTE } from "./palette";

const DARK = "(prefers-color-scheme: dark)";

/** The colours in force as plain values, for what cannot read the page's tokens. */
export function usePageColours(): Palette {
  const dark = useSyncExternalStore(watch, isDark, () => false);
  return dark ? PEAT_PALETTE : PAPER_PALETTE;
}

function isDark(): boolean {
  const theme = document.documentElement.dataset.theme;
  return theme === "dark" || (theme !== "light" && matchMedia(DARK).matches);
}

function watch(onChange: () => void): () => void {
  const media = matchMedia(DARK);
  const observer = new MutationObserver(onChange);
  media.addEventListener("change", onChange);
  observer.observe(document.documentElement, { attributes: true, attributeFilter: ["data-theme"] });
  return () => {
    media.removeEventListener("change", onChange);
    observer.disconnect();
  };
}
