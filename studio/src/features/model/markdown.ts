/** A piece of a line: plain words, words set as code or in bold, or a link to a heading of the same document. */
export type Span = { kind: 'text' | 'code' | 'bold'; text: string } | { kind: 'link'; text: string; anchor: string };

/** A block of a document. */
export type Block =
  | { kind: 'heading'; level: number; spans: Span[]; anchor: string }
  | { kind: 'paragraph'; spans: Span[] }
  | { kind: 'list'; numbered: boolean; items: Span[][] }
  | { kind: 'code'; text: string }
  | { kind: 'table'; head: Span[][]; rows: Span[][][] };

/**
 * Reads the part of Markdown that the engine's MODEL.md is written in: headings, paragraphs, lists, tables and fenced
 * code, with code, bold and links to headings inside lines. Anything else stays as it is written.
 */
export function readMarkdown(source: string): Block[] {
  const lines = source.replaceAll('\r\n', '\n').split('\n');
  const blocks: Block[] = [];
  let at = 0;
  const take = (belongs: (line: string) => boolean) => {
    const from = at;
    while (at < lines.length && belongs(lines[at]!)) at++;
    return lines.slice(from, at);
  };
  while (at < lines.length) {
    const line = lines[at]!;
    const heading = /^(#{1,6}) +(.*)$/.exec(line);
    if (line.trim() === '') at++;
    else if (heading) {
      blocks.push(headingOf(heading[1]!.length, heading[2]!));
      at++;
    } else if (line.startsWith('```')) {
      at++;
      blocks.push({ kind: 'code', text: take((next) => !next.startsWith('```')).join('\n') });
      at++;
    } else if (line.startsWith('|')) blocks.push(tableOf(take((next) => next.startsWith('|'))));
    else if (isItem(line)) blocks.push(listOf(take((next) => next.trim() !== '')));
    else {
      at++;
      const text = [line, ...take((next) => !startsBlock(next))];
      blocks.push({ kind: 'paragraph', spans: spansOf(text.map((one) => one.trim()).join(' ')) });
    }
  }
  return blocks;
}

const ITEM = /^([-*]|\d+\.) /;
const isItem = (line: string) => ITEM.test(line);
const startsBlock = (line: string) => line.trim() === '' || /^(#{1,6} |```|\|)/.test(line) || isItem(line);

function headingOf(level: number, text: string): Block {
  // The name that a link to the heading carries, by the usual rule: small letters, no punctuation, hyphens for spaces.
  const anchor = text
    .toLowerCase()
    .replace(/[^\p{L}\p{N} -]/gu, '')
    .replaceAll(' ', '-');
  return { kind: 'heading', level, spans: spansOf(text), anchor };
}

function listOf(lines: string[]): Block {
  const items: string[] = [];
  for (const line of lines) {
    if (isItem(line)) items.push(line.replace(ITEM, '').trim());
    else items[items.length - 1] += ` ${line.trim()}`;
  }
  return { kind: 'list', numbered: /^\d/.test(lines[0]!), items: items.map(spansOf) };
}

function tableOf(lines: string[]): Block {
  const cells = lines.map((line) =>
    line
      .replace(/^\||\|\s*$/g, '')
      .split('|')
      .map((cell) => spansOf(cell.trim())),
  );
  const [head = [], , ...rows] = cells;
  return { kind: 'table', head, rows };
}

/** Splits a line at `code`, **bold** and [links](#to-a-heading). */
export function spansOf(line: string): Span[] {
  return line
    .split(/(`[^`]+`|\*\*[^*]+\*\*|\[[^\]]+\]\(#[^)]+\))/)
    .filter((part) => part !== '')
    .map((part): Span => {
      if (part.startsWith('`')) return { kind: 'code', text: part.slice(1, -1) };
      if (part.startsWith('**')) return { kind: 'bold', text: part.slice(2, -2) };
      const link = /^\[([^\]]+)\]\(#([^)]+)\)$/.exec(part);
      if (link) return { kind: 'link', text: link[1]!, anchor: link[2]! };
      return { kind: 'text', text: part };
    });
}
