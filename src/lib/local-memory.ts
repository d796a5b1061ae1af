/** What a person's browser remembers between visits; storage may be forbidden, then nothing is remembered. */
const PREFIX = 'skysheaf.';

export function remembered(key: string): string | null {
  try {
    return localStorage.getItem(PREFIX + key);
  } catch {
    return null;
  }
}

export function remember(key: string, value: string | null): void {
  try {
    if (value === null) localStorage.removeItem(PREFIX + key);
    else localStorage.setItem(PREFIX + key, value);
  } catch {
    // Not remembered, and that is all.
  }
}
