import { useSyncExternalStore } from 'react';
import { remember, remembered } from './local-memory.ts';

/** `src/public/theme.js` applies the remembered choice before the first paint. */
export type ThemeChoice = 'system' | 'light' | 'dark';

const listeners = new Set<() => void>();
const read = (): ThemeChoice => {
  const choice = remembered('theme');
  return choice === 'light' || choice === 'dark' ? choice : 'system';
};

export function chooseTheme(choice: ThemeChoice): void {
  remember('theme', choice === 'system' ? null : choice);
  if (choice === 'system') delete document.documentElement.dataset.theme;
  else document.documentElement.dataset.theme = choice;
  for (const listener of listeners) listener();
}

const darkSystem = window.matchMedia('(prefers-color-scheme: dark)');
const subscribe = (listener: () => void): (() => void) => {
  listeners.add(listener);
  darkSystem.addEventListener('change', listener);
  return () => {
    listeners.delete(listener);
    darkSystem.removeEventListener('change', listener);
  };
};

export const useThemeChoice = (): ThemeChoice => useSyncExternalStore(subscribe, read);
/** The theme that shows. */
export const useShownTheme = (): 'light' | 'dark' =>
  useSyncExternalStore(subscribe, () => {
    const choice = read();
    return choice === 'system' ? (darkSystem.matches ? 'dark' : 'light') : choice;
  });
