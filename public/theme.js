/* Sets the theme before the first paint; src/lib/theme.ts does the same and the rest later. */
(function () {
  var choice = null;
  try {
    choice = localStorage.getItem('strutbee-theme');
  } catch {
    /* Storage is closed to us: paper. */
  }
  var night =
    choice === 'night' ||
    (choice === 'device' && window.matchMedia && matchMedia('(prefers-color-scheme: dark)').matches);
  document.documentElement.dataset.theme = night ? 'night' : 'paper';
})();
