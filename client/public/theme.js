/* global document, matchMedia */
// Before the first paint: the theme that was chosen on this device, else what the system asks for.
(function () {
  let theme = null;
  try {
    theme = localStorage.getItem('fusekeeper-theme');
  } catch {
    // Storage can be closed to a page; the system's wish is enough then.
  }
  if (theme !== 'day' && theme !== 'night') {
    theme = matchMedia('(prefers-color-scheme: dark)').matches ? 'night' : 'day';
  }
  document.documentElement.dataset.theme = theme;
})();
