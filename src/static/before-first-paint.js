// Runs before anything is painted, as a file of its own because the Content-Security-Policy allows no inline script:
// the chosen theme must stand before the first pixel, and the schema library must not probe for eval, which the
// policy would report.
(() => {
  Object.assign(globalThis, { __zod_globalConfig: { jitless: true } });
  let chosen = null;
  try {
    chosen = localStorage.getItem('millrace-theme');
  } catch {
    // Storage is switched off: the system's theme it is.
  }
  const dark = chosen === 'dark' || (chosen !== 'light' && matchMedia('(prefers-color-scheme: dark)').matches);
  document.documentElement.dataset.theme = dark ? 'dark' : 'light';
})();
