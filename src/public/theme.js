// Runs before the first paint; theme-store.ts writes what this reads.
(function () {
  try {
    var theme = localStorage.getItem('theme');
    if (theme === 'light' || theme === 'dark') document.documentElement.dataset.theme = theme;
  } catch {
    // Storage may be closed to us; the system's own choice then holds.
  }
})();
