import { describe, expect, it } from 'vitest';
import { escapeXml, fileNameOf, resolveTokens, wrapText } from './export-text.ts';
import { textWidth } from './label-fit.ts';

describe('fileNameOf', () => {
  it('keeps letters and figures', () => {
    expect(fileNameOf('Vicuña at Salar Tola, warm arrival', 'strips', 'svg')).toBe(
      'vicuna-at-salar-tola-warm-arrival-strips.svg',
    );
  });
  it('never has an empty or a hidden name', () => {
    expect(fileNameOf('../…', '', 'png')).toBe('session.png');
  });
});

it('wrapText keeps every word and every line within the width', () => {
  const text = 'A simulation is not a test. Results are estimates for engineering study.';
  const lines = wrapText(text, 200, 12);
  expect(lines.join(' ')).toBe(text);
  for (const line of lines) expect(textWidth(line, 12)).toBeLessThanOrEqual(200);
});

it('resolveTokens leaves no variable behind', () => {
  const values: Record<string, string> = { '--ink': '#1c2227', '--f-text': '"A B", serif' };
  const svg = '<path stroke="var(--ink)"/><text style="font-family: var(--f-text)"/>';
  expect(resolveTokens(svg, (token) => values[token]!)).toBe(
    `<path stroke="#1c2227"/><text style="font-family: 'A B', serif"/>`,
  );
});

it('escapeXml', () => expect(escapeXml('a < b & "c"')).toBe('a &lt; b &amp; &quot;c&quot;'));
