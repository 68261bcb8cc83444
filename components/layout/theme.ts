export const themes = ["system", "light", "dark"] as const;
export type Theme = (typeof themes)[number];

/** The choice out of its cookie; "system" where none was made. */
export function readTheme(value: string | undefined): Theme {
  return themes.find((theme) => theme === value) ?? "system";
}

/** Shows a theme at once and remembers it for a year. */
export function chooseTheme(theme: Theme): void {
  const root = document.documentElement;
  if (theme === "system") root.removeAttribute("data-theme");
  else root.dataset.theme = theme;
  document.cookie = `theme=${theme}; path=/; max-age=31536000; samesite=lax`;
}
