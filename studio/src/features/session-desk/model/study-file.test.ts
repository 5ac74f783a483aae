import { expect, test } from 'vitest';
import { sampleStudy } from './sample-study.ts';
import { readStudyFile, studyFileText } from './study-file.ts';

test('readStudyFile gives back exactly what studyFileText wrote', () => {
  expect(readStudyFile(studyFileText(sampleStudy))).toEqual({ study: sampleStudy });
  expect(readStudyFile(`\uFEFF${studyFileText(sampleStudy)}`)).toEqual({ study: sampleStudy });
});

test('readStudyFile lists path, rule and value of every field at fault', () => {
  const text = JSON.stringify({ ...sampleStudy, station: { ...sampleStudy.station, currentMaxA: -1, cable: 2 } });
  expect(readStudyFile(text)).toMatchObject({
    issues: expect.arrayContaining([
      expect.objectContaining({ path: 'station.currentMaxA', rule: 'range', value: '-1' }),
      expect.objectContaining({ path: 'station.cable', rule: 'unknown-key' }),
    ]),
  });
});

test('readStudyFile says what is no JSON and what is no study', () => {
  expect(readStudyFile('{')).toMatchObject({ issues: [{ rule: 'json' }] });
  expect(readStudyFile('{"format":"other"}')).toMatchObject({ issues: [{ path: 'format' }] });
});
