import bricolage from '@fontsource-variable/bricolage-grotesque/files/bricolage-grotesque-latin-opsz-normal.woff2?url';
import instrument from '@fontsource-variable/instrument-sans/files/instrument-sans-latin-wght-normal.woff2?url';
import spline from '@fontsource-variable/spline-sans-mono/files/spline-sans-mono-latin-wght-normal.woff2?url';

const faces = [
  { family: 'Bricolage Grotesque Variable', weights: '200 800', url: bricolage },
  { family: 'Instrument Sans Variable', weights: '400 700', url: instrument },
  { family: 'Spline Sans Mono Variable', weights: '300 700', url: spline },
];

let rules: Promise<string> | undefined;

/** @font-face rules that carry the fonts themselves, so that an exported drawing looks the same everywhere. */
export function embeddedFontRules(): Promise<string> {
  rules ??= Promise.all(faces.map(fontRule)).then(
    (parts) => parts.join(''),
    (error: unknown) => {
      rules = undefined;
      throw error;
    },
  );
  return rules;
}

async function fontRule({ family, weights, url }: (typeof faces)[number]): Promise<string> {
  const response = await fetch(url);
  if (!response.ok) throw new Error(`Cannot load the font ${family}: the server answered ${response.status}.`);
  const base64 = toBase64(new Uint8Array(await response.arrayBuffer()));
  return `@font-face{font-family:'${family}';font-weight:${weights};src:url(data:font/woff2;base64,${base64}) format('woff2')}`;
}

function toBase64(bytes: Uint8Array): string {
  let binary = '';
  for (const byte of bytes) binary += String.fromCharCode(byte);
  return btoa(binary);
}
