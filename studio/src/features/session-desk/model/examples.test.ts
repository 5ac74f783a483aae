import { readdirSync, readFileSync } from 'node:fs';
import { parseSessionStudy, simulateSession, type LimitCode } from '@voltiplano/engine';
import { expect, test } from 'vitest';
import { examples } from '../../../lib/examples.ts';
import { readStudyFile, studyFileText } from './study-file.ts';
import { sessionSentence } from './session-sentence.ts';

const run = async (title: string) => {
  const study = await examples.find((one) => one.title === title)!.load();
  return simulateSession(parseSessionStudy(study)).result;
};
const held = async (title: string, code: LimitCode) => (await run(title)).metrics.limitMinutes[code];

test('every example runs, reads back from its own file, and has a sentence', async () => {
  for (const { load } of examples) {
    const study = await load();
    expect(readStudyFile(studyFileText(study))).toEqual({ study });
    expect(sessionSentence(simulateSession(parseSessionStudy(study)).result).length).toBeGreaterThan(4);
  }
});

test('the examples show what they say', async () => {
  expect(await held('Vicuña, cold morning', 'cold')).toBeGreaterThan(5);
  expect(await held('Vicuña, shared station', 'station-power')).toBeGreaterThan(5);
  expect(await held('Vicuña, third stop of a hot day', 'hot')).toBeGreaterThan(5);
  expect((await run('Suri on a 500 V station')).events.some(({ event }) => event === 'boost')).toBe(true);
  expect((await run('Vicuña town, LFP')).events.some(({ event }) => event === 'ledge:2')).toBe(true);
});

test('every session among the example files is on the menu, and nothing else', async () => {
  const folder = new URL('../../../../../examples/', import.meta.url);
  const files = readdirSync(folder).filter((name) => name.endsWith('.json'));
  const studies = files.map((name) => JSON.parse(readFileSync(new URL(name, folder), 'utf8')) as { kind: string });
  const byText = (one: unknown) => JSON.stringify(one);
  const sessions = studies.filter(({ kind }) => kind === 'session').map(byText);
  expect(sessions.sort()).toEqual((await Promise.all(examples.map(({ load }) => load()))).map(byText).sort());
});
