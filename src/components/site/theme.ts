/** The theme a person chose in this browser. Without a choice the device's own applies. */

export const THEMES = ["device", "light", "dark"] as const;
export type Theme = (typeof THEMES)[number];

// public/theme.js reads the same key before the first paint.
const STORAGE_KEY = "rimelight-theme";
/** Sent on `document` after a change, for charts and switches that must follow. */
export const THEME_EVENT = "rimelight:theme";

export function isTheme(value: unknown): value is Theme {
  return THEMES.some((theme) => theme === value);
}

export function currentTheme(): Theme {
  const chosen = document.documentElement.dataset["theme"];
  return chosen === "light" || chosen === "dark" ? chosen : "device";
}

export function chooseTheme(theme: Theme): void {
  if (theme === "device") delete document.documentElement.dataset["theme"];
  else document.documentElement.dataset["theme"] = theme;
  try {
    if (theme === "device") localStorage.removeItem(STORAGE_KEY);
    else localStorage.setItem(STORAGE_KEY, theme);
  } catch {
    // Storage is closed: the choice lasts for this page only.
  }
  document.dispatchEvent(new CustomEvent(THEME_EVENT, { detail: theme }));
}
