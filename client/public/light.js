// Runs before the first paint, so that a dark room never sees a white flash. The same rule as
// src/theme/light.ts: the reader's choice, else lamp for the phone, else the system's setting.
(function () {
  var place = /^\/(f|retune)(\/|$)/.test(location.pathname) ? 'phone' : 'desk';
  var choice = null;
  try {
    choice = localStorage.getItem('pegwell-light-' + place);
  } catch {
    // Storage may be closed to pages; the rule below still holds.
  }
  var dark = place === 'phone' || matchMedia('(prefers-color-scheme: dark)').matches;
  document.documentElement.dataset.light =
    choice === 'day' || choice === 'lamp' ? choice : dark ? 'lamp' : 'day';
})();
