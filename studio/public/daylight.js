// Sets day or night before the first paint, so that no page flashes in the other. A file of its own: the
// Content-Security-Policy allows no inline script. Kept in step with src/lib/daylight.ts.
(function () {
  try {
    const chosen = globalThis.localStorage.getItem('voltiplano.daylight');
    if (chosen === '"day"') globalThis.document.documentElement.classList.add('day');
    if (chosen === '"night"') globalThis.document.documentElement.classList.add('night');
  } catch {
    // Storage may be refused; the system's setting then decides.
  }
})();
