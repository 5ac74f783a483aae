import { textWidth } from './label-fit.ts';

/** A file name from a title: "Vicuña at Salar Tola, warm" and "strips" give "vicuna-at-salar-tola-warm-strips.svg". */
export function fileNameOf(title: string, part: string, extension: string): string {
  const plain = title
    .normalize('NFD')
    .replace(/\p{Diacritic}/gu, '')
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, '-')
    .replace(/^-|-$/g, '')
    .slice(0, 80);
  return [plain || 'session', part].filter(Boolean).join('-') + `.${extension}`;
}

/** Breaks a text into lines no wider than `width` [px] at a type size. */
export function wrapText(text: string, width: number, size: number): string[] {
  const lines: string[] = [];
  for (const word of text.split(' ')) {
    const last = lines[lines.length - 1];
    const longer = last === undefined ? word : `${last} ${word}`;
    if (last === undefined || textWidth(longer, size) > width) lines.push(word);
    else lines[lines.length - 1] = longer;
  }
  return lines;
}

/** Puts plain values in place of `var(--token)`: drawing programs know no CSS variables. */
export function resolveTokens(svg: string, valueOf: (token: string) => string): string {
  // A font list carries quotes of its own, which would end the attribute around it.
  return svg.replace(/var\((--[\w-]+)\)/g, (_, token: string) => valueOf(token).replaceAll('"', "'"));
}

export function escapeXml(text: string): string {
  return text.replaceAll('&', '&amp;').replaceAll('<', '&lt;').replaceAll('>', '&gt;').replaceAll('"', '&quot;');
}
