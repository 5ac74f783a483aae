const STYLE = `
  body { font: 16px/1.5 system-ui, sans-serif; max-width: 64rem; margin: 2rem auto; padding: 0 1rem; color: #22201c; background: #fbf9f5; }
  table { border-collapse: collapse; width: 100%; margin: 0.5rem 0; }
  th, td { text-align: left; vertical-align: top; padding: 0.25rem 0.75rem 0.25rem 0; border-bottom: 1px solid #ddd6c8; }
  code, pre { font-family: ui-monospace, monospace; font-size: 0.9em; }
  pre { white-space: pre-wrap; background: #f1ece2; padding: 0.75rem; }
  article { border-top: 1px solid #b9ae98; padding: 0.5rem 0 1rem; }
  a { color: #8f3f22; }
  @media (prefers-color-scheme: dark) {
    body { color: #ece7dc; background: #1d1b18; }
    th, td { border-color: #4a453c; }
    pre { background: #2a2722; }
    a { color: #eda283; }
  }`;

/** A plain page without scripts, for what the server shows by itself. @param body  HTML; escape what others wrote */
export function htmlPage(title: string, body: string): string {
  return `<!doctype html>
<html lang="en">
<head><meta charset="utf-8"><meta name="viewport" content="width=device-width, initial-scale=1">
<link rel="icon" href="/mark.svg" type="image/svg+xml">
<title>${escapeHtml(title)} · Voltiplano</title><style>${STYLE}</style></head>
<body><main><h1>${escapeHtml(title)}</h1>
${body}
</main></body></html>
`;
}

/** Makes text safe inside an element or a quoted attribute. */
export function escapeHtml(text: string): string {
  return text
    .replaceAll('&', '&amp;')
    .replaceAll('<', '&lt;')
    .replaceAll('>', '&gt;')
    .replaceAll('"', '&quot;')
    .replaceAll("'", '&#39;');
}
