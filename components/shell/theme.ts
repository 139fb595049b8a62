/** The cookie lets the server write data-theme into the first byte, so no script has to run before paint. */
export const themeCookie = "theme";

export type Theme = "system" | "light" | "dark";

export function parseTheme(value: string | undefined): Theme {
  return value === "light" || value === "dark" ? value : "system";
}
