import { expect, it } from 'vitest';
import { readMarkdown } from './markdown.ts';

const text = (words: string) => [{ kind: 'text', text: words }];

it('reads headings, paragraphs over several lines, lists, code and tables', () => {
  const source = [
    '# Model',
    'One line',
    'and its second.',
    '',
    '- first',
    '  goes on',
    '- second',
    '',
    '```',
    'a(T) = exp(1/T)',
    '| not a table |',
    '```',
    '| x | y |',
    '|---|---|',
    '| 1 | 2 |',
  ].join('\n');
  expect(readMarkdown(source)).toEqual([
    { kind: 'heading', level: 1, spans: text('Model'), anchor: 'model' },
    { kind: 'paragraph', spans: text('One line and its second.') },
    { kind: 'list', numbered: false, items: [text('first goes on'), text('second')] },
    { kind: 'code', text: 'a(T) = exp(1/T)\n| not a table |' },
    { kind: 'table', head: [text('x'), text('y')], rows: [[text('1'), text('2')]] },
  ]);
});

it('keeps code and bold inside a line', () => {
  expect(readMarkdown('The **pack** has `zLow`.')).toEqual([
    {
      kind: 'paragraph',
      spans: [
        { kind: 'text', text: 'The ' },
        { kind: 'bold', text: 'pack' },
        { kind: 'text', text: ' has ' },
        { kind: 'code', text: 'zLow' },
        { kind: 'text', text: '.' },
      ],
    },
  ]);
});

it('ends where a fence is never closed', () => {
  expect(readMarkdown('```\nx = 1')).toEqual([{ kind: 'code', text: 'x = 1' }]);
});

it('leads from a numbered list of contents to its headings', () => {
  const [list, heading] = readMarkdown('1. [What a run returns](#1-what-a-run-returns)\n\n## 1. What a run returns');
  const link = { kind: 'link', text: 'What a run returns', anchor: '1-what-a-run-returns' };
  expect(list).toEqual({ kind: 'list', numbered: true, items: [[link]] });
  expect(heading).toMatchObject({ anchor: '1-what-a-run-returns' });
});
