export const THEMES = ['day', 'night', 'system'] as const;
export type Theme = (typeof THEMES)[number];
export const THEME_LABELS: Readonly<Record<Theme, string>> = { day: 'Daylight', night: 'Night', system: 'As the system' };
export const THEME_COOKIE = 'theme';

/** What a cookie says, whoever wrote it; anything else is the system's choice. */
export function parseTheme(text: string | undefined): Theme {
  return THEMES.find((theme) => theme === text) ?? 'system';
}

/** The `data-theme` of the root element: none when the system decides. */
export function themeAttribute(theme: Theme): 'day' | 'night' | undefined {
  return theme === 'system' ? undefined : theme;
}

let applied: Theme | null = null;
const listeners = new Set<() => void>();

/** Turns the open page to a theme and remembers it for a year, so that the server draws the next page in it. */
export function applyTheme(theme: Theme): void {
  const attribute = themeAttribute(theme);
  if (attribute === undefined) delete document.documentElement.dataset.theme;
  else document.documentElement.dataset.theme = attribute;
  document.cookie = `${THEME_COOKIE}=${theme}; path=/; max-age=31536000; samesite=lax`;
  applied = theme;
  for (const listener of listeners) listener();
}

/** What was chosen since the page was loaded; null as long as the server's word stands. */
export function appliedTheme(): Theme | null {
  return applied;
}

export function subscribeToTheme(listener: () => void): () => void {
  listeners.add(listener);
  return () => {
    listeners.delete(listener);
  };
}
