import { readFileSync } from 'node:fs';
import { expect, it } from 'vitest';
import { readMarkdown, type Span } from './markdown.ts';

const blocks = readMarkdown(readFileSync(new URL('../../../../engine/MODEL.md', import.meta.url), 'utf8'));
const spans: Span[] = blocks.flatMap((block) => {
  if (block.kind === 'list') return block.items.flat();
  if (block.kind === 'table') return [...block.head, ...block.rows.flat()].flat();
  return block.kind === 'code' ? [] : block.spans;
});

it('the model page leaves no mark of Markdown unread', () => {
  for (const { kind, text } of spans) if (kind === 'text') expect(text).not.toMatch(/\*\*|`|\]\(|^#|^> |!\[/);
});

it('every link of the model page leads to one of its headings', () => {
  const anchors = blocks.flatMap((block) => (block.kind === 'heading' ? [block.anchor] : []));
  const links = spans.flatMap((span) => (span.kind === 'link' ? [span.anchor] : []));
  expect(links.length).toBeGreaterThan(10);
  expect(anchors).toEqual(expect.arrayContaining(links));
  expect(new Set(anchors).size).toBe(anchors.length);
});
