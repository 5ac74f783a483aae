import { readFileSync } from 'node:fs';
import { expect, test } from 'vitest';
import { issuesOf, judgeFile, titled } from './judge-file.ts';

const example = (name: string) =>
  readFileSync(new URL(`../../../../../examples/${name}.json`, import.meta.url), 'utf8');
const file = (text: string, name = 'study.json') => new File([text], name);
const warm = example('vicuna-warm-arrival');

test('judgeFile knows a session and a trip, and takes the file as it is', async () => {
  const session = await judgeFile(file(warm));
  expect(session).toEqual({
    is: 'study',
    kind: 'session',
    title: 'Vicuña at Salar Tola, warm arrival',
    inputs: JSON.parse(warm) as unknown,
  });
  expect(await judgeFile(file(`\uFEFF${example('vicuna-one-leg')}`))).toMatchObject({ is: 'study', kind: 'trip' });
});

test('a study without a title is called as its file', async () => {
  const bare = { ...(JSON.parse(warm) as object), title: ' ' };
  expect(await judgeFile(file(JSON.stringify(bare), 'Cold run.JSON'))).toMatchObject({
    title: 'Cold run',
    inputs: { title: 'Cold run' },
  });
});

test('judgeFile names path, rule and value of each fault', async () => {
  const study = JSON.parse(warm) as { session: { startSoc: number }; pack: { series: number } };
  study.session.startSoc = 1.4;
  study.pack.series = 0;
  const judged = await judgeFile(file(JSON.stringify(study)));
  expect(judged.is).toBe('wrong');
  const issues = 'issues' in judged ? judged.issues : [];
  expect(issues.map(({ path, value }) => [path, value])).toEqual(
    expect.arrayContaining([
      ['session.startSoc', '1.4'],
      ['pack.series', '0'],
    ]),
  );
  expect(issues.every(({ rule, message }) => rule.length > 0 && message.length > 0)).toBe(true);
});

test.each([
  ['{nope', 'json'],
  ['', 'json'],
  ['[]', 'format'],
  ['null', 'format'],
  ['{"format":"other"}', 'format'],
])('judgeFile refuses %j by the rule "%s"', async (text, rule) => {
  expect(await judgeFile(file(text))).toMatchObject({ is: 'wrong', issues: [{ rule }] });
});

test('judgeFile recognises a library and counts its parts', async () => {
  const library = { format: 'voltiplano/library', version: 1, items: [{}, {}] };
  expect(await judgeFile(file(JSON.stringify(library)))).toEqual({ is: 'library', parts: 2 });
  expect(await judgeFile(file('{"format":"voltiplano/library"}'))).toEqual({ is: 'library', parts: 0 });
});

test('judgeFile does not read what is too large, and says so when the browser cannot read', async () => {
  const unread = () => Promise.reject(new Error('gone'));
  expect(await judgeFile({ name: 'a.json', size: 2_000_000, text: unread })).toMatchObject({
    issues: [{ rule: 'size', value: '2000 kB' }],
  });
  expect(await judgeFile({ name: 'a.json', size: 10, text: unread })).toMatchObject({
    issues: [{ rule: 'unreadable', message: 'The browser cannot read this file: gone' }],
  });
});

test('titled and issuesOf', () => {
  const study = JSON.parse(warm) as Parameters<typeof titled>[0];
  expect(titled(study, study.title!)).toBe(study);
  expect(titled(study, 'Other')).toEqual({ ...study, title: 'Other' });
  expect(issuesOf(study)).toEqual([]);
  expect(issuesOf({ ...study, pack: {} }).length).toBeGreaterThan(0);
});
