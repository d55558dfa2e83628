// Runs before the first paint, so that a dark room is never lit by a white flash.
// The application's ThemeChoice takes over from here; both know the same storage key and classes.
(function () {
  'use strict';
  var chosen = null;
  try {
    chosen = localStorage.getItem('lampmeadow.theme');
  } catch {
    // Storage can be forbidden; the system's wish is a good answer then.
  }
  var dark = matchMedia('(prefers-color-scheme: dark)').matches;
  var shown = chosen === 'day' || chosen === 'lamps-off' ? chosen : dark ? 'lamps-off' : 'day';
  document.documentElement.classList.add(shown);
})();
