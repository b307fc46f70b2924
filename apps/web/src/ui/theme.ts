import { useSyncExternalStore } from 'react';

export const THEMES = ['system', 'light', 'dark'] as const;
export type Theme = (typeof THEMES)[number];

const KEY = 'farlug-theme';
const listeners = new Set<() => void>();

const isTheme = (value: string | undefined | null): value is Theme => THEMES.some((theme) => theme === value);

function current(): Theme {
  const set = document.documentElement.dataset.theme;
  return isTheme(set) ? set : 'system';
}

export function chooseTheme(theme: Theme): void {
  if (theme === 'system') delete document.documentElement.dataset.theme;
  else document.documentElement.dataset.theme = theme;
  try {
    if (theme === 'system') localStorage.removeItem(KEY);
    else localStorage.setItem(KEY, theme);
  } catch {
    // A browser that stores nothing still shows the theme until the page is left.
  }
  for (const listener of listeners) listener();
}

export function useTheme(): [Theme, (theme: Theme) => void] {
  const theme = useSyncExternalStore((changed) => {
    listeners.add(changed);
    return () => listeners.delete(changed);
  }, current);
  return [theme, chooseTheme];
}
