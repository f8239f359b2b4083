import { useEffect } from "react";
import { useFetcher, useLocation } from "react-router";
import { isThemeChoice, THEME_CHOICES, type ThemeChoice } from "./theme";

const LABELS: Record<ThemeChoice, string> = { system: "As the system", light: "Paper", dark: "Peat" };

/**
 * Three buttons in one form: `POST /theme` with `theme` and `returnTo`. Without JavaScript the route
 * redirects back to `returnTo`; with it the colours change at once.
 */
export function ThemeSwitch({ choice }: { choice: ThemeChoice }) {
  const fetcher = useFetcher();
  const { pathname, search } = useLocation();
  const asked = fetcher.formData?.get("theme");
  const shown = isThemeChoice(asked) ? asked : choice;
  useEffect(() => {
    document.documentElement.dataset.theme = shown;
  }, [shown]);
  return (
    <fetcher.Form method="post" action="/theme" className="theme-switch" aria-label="Colours">
      <input type="hidden" name="returnTo" value={pathname + search} />
      {THEME_CHOICES.map((option) => (
        <button key={option} type="submit" name="theme" value={option} aria-pressed={option === shown}>
          {LABELS[option]}
        </button>
      ))}
    </fetcher.Form>
  );
}
