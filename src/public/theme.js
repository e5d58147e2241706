// Runs before the first paint, so that a chosen theme does not flash. Its key is the one of src/lib/theme.ts.
(function () {
  try {
    var chosen = globalThis.localStorage.getItem('tallybarn.theme');
    if (chosen === 'light' || chosen === 'dark')
      globalThis.document.documentElement.dataset.theme = chosen;
  } catch (refused) {
    console.info('Storage is closed to this page; the theme follows the system.', refused);
  }
})();
