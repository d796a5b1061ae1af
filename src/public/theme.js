// Runs before the first paint; the same key is written by src/lib/theme.ts.
try {
  const theme = localStorage.getItem('skysheaf.theme');
  if (theme === 'light' || theme === 'dark') document.documentElement.dataset.theme = theme;
} catch {
  // Storage may be forbidden: then the system's theme holds.
}
