/** The colour theme a browser asked for, kept in a cookie so that the first paint is right. */

export const THEME_CHOICES = ["system", "light", "dark"] as const;
export type ThemeChoice = (typeof THEME_CHOICES)[number];

const COOKIE_NAME = "theme";
const ONE_YEAR_S = 31_536_000;

export function isThemeChoice(value: unknown): value is ThemeChoice {
  return THEME_CHOICES.includes(value as ThemeChoice);
}

/** The choice in a `Cookie` header; "system" where there is none or it is not one of ours. */
export function themeFromCookie(cookieHeader: string | null): ThemeChoice {
  const pairs = (cookieHeader ?? "").split(";").map((pair) => pair.trim());
  const value = pairs.find((pair) => pair.startsWith(`${COOKIE_NAME}=`))?.slice(COOKIE_NAME.length + 1);
  return isThemeChoice(value) ? value : "system";
}

/** The `Set-Cookie` value that keeps a choice. */
export function themeCookie(choice: ThemeChoice): string {
  return `${COOKIE_NAME}=${choice}; Path=/; Max-Age=${ONE_YEAR_S}; SameSite=Lax`;
}
