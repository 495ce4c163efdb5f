/** Light or dark: as the system says, or as the person chose for this browser. */
export type Theme = 'auto' | 'light' | 'dark';

const KEY = 'halfmark:theme';
const THEMES: readonly unknown[] = ['auto', 'light', 'dark'];

export function isTheme(value: unknown): value is Theme {
  return THEMES.includes(value);
}

/** The theme chosen earlier. A browser that keeps nothing follows the system. */
export function readTheme(): Theme {
  try {
    const kept = localStorage.getItem(KEY);
    return isTheme(kept) ? kept : 'auto';
  } catch {
    return 'auto';
  }
}

/** Sets the theme of the whole page (shared/page.css reads the attribute) and keeps it. */
export function setTheme(theme: Theme): void {
  document.documentElement.dataset.theme = theme;
  try {
    localStorage.setItem(KEY, theme);
  } catch {
    // It holds for this visit.
  }
}

/** What drawings are to look like now. */
export function isDark(theme: Theme): boolean {
  return theme === 'dark' || (theme === 'auto' && matchMedia('(prefers-color-scheme: dark)').matches);
}
