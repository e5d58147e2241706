import { useSyncExternalStore } from 'react';
import { palettes, type Palette, type ThemeName } from '#src/styles/tokens.ts';

export type ThemeChoice = 'system' | ThemeName;

/** Read by src/public/theme.js too, before the first paint. */
const KEY = 'tallybarn.theme';
const system = window.matchMedia('(prefers-color-scheme: dark)');
const print = window.matchMedia('print');
const listeners = new Set<() => void>();

function stored(): ThemeChoice {
  const value = document.documentElement.dataset['theme'];
  return value === 'light' || value === 'dark' ? value : 'system';
}

/** Paper is light, whatever the screen shows. */
function shown(): ThemeName {
  if (print.matches) return 'light';
  const choice = stored();
  if (choice !== 'system') return choice;
  return system.matches ? 'dark' : 'light';
}

function subscribe(listener: () => void): () => void {
  listeners.add(listener);
  system.addEventListener('change', listener);
  print.addEventListener('change', listener);
  return () => {
    listeners.delete(listener);
    system.removeEventListener('change', listener);
    print.removeEventListener('change', listener);
  };
}

/** Takes effect at once, and is remembered where the browser allows it. */
export function chooseTheme(choice: ThemeChoice): void {
  if (choice === 'system') delete document.documentElement.dataset['theme'];
  else document.documentElement.dataset['theme'] = choice;
  try {
    if (choice === 'system') localStorage.removeItem(KEY);
    else localStorage.setItem(KEY, choice);
  } catch (refused) {
    console.info('Storage is closed to this page; the theme lasts until it is closed.', refused);
  }
  for (const listener of listeners) listener();
}

export function useThemeChoice(): ThemeChoice {
  return useSyncExternalStore(subscribe, stored);
}

/** The colours now on the screen, for what cannot read custom properties: plots on a canvas. */
export function usePalette(): { name: ThemeName; palette: Palette } {
  const name = useSyncExternalStore(subscribe, shown);
  return { name, palette: palettes[name] };
}
