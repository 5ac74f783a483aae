// Each subset loads only where a page uses its glyphs. The files lack a few signs (→ ≥ ≤ Δ Ω η): words stand for them.
import '@fontsource-variable/bricolage-grotesque/opsz.css';
import '@fontsource-variable/instrument-sans/wght.css';
import '@fontsource-variable/spline-sans-mono/wght.css';
