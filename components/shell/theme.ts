export const THEME_COOKIE = "stepwell-theme";

export const THEMES = ["day", "night", "system"] as const;
export type Theme = (typeof THEMES)[number];

/** The theme that a cookie asks for; `system` when it says nothing we know. */
export function themeFrom(cookie: string | undefined): Theme {
  return THEMES.find((theme) => theme === cookie) ?? "system";
}
