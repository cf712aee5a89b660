/** Paper by day, microfiche by night; "system" follows the device and is kept as no cookie at all. */
export type ThemeChoice = "system" | "light" | "dark";

export const themeCookie = "theme";

/** The choice in a cookie's value; anything unknown follows the system. */
export function themeFromCookie(value: string | undefined): ThemeChoice {
  return value === "light" || value === "dark" ? value : "system";
}
