import { expect, test } from 'vitest';
import { sampleStudy } from './sample-study.ts';
import { LINK_MAX_BYTES, studyFromHash, studyLink } from './study-link.ts';

test('studyFromHash reads back the study of studyLink', async () => {
  const made = await studyLink(sampleStudy, 'https://desk.invalid/try');
  if (!('link' in made)) throw new Error(made.refusal);
  expect(made.link.length).toBeLessThan(2000);
  expect(await studyFromHash(new URL(made.link).hash)).toEqual({ study: sampleStudy });
});

test('studyLink refuses what would be longer than 8 kB', async () => {
  // Digits without a pattern do not compress away.
  const x = Array.from({ length: 3000 }, (_, i) => i / 3000);
  const y = x.map((z) => 3 + z + 0.1 * Math.abs(Math.sin(1e4 * z)) * z);
  const long = { ...sampleStudy, cell: { ...sampleStudy.cell, ocv: { x, y } } };
  const made = await studyLink(long, 'https://desk.invalid/try');
  expect(made).toMatchObject({ refusal: expect.stringMatching(/too long for a link \(\d+\.\d kB, at most 8 kB\)/) });
  expect(LINK_MAX_BYTES).toBe(8192);
});

test('studyFromHash says when a link is broken, and leaves other hashes alone', async () => {
  expect(await studyFromHash('#study=abc')).toMatchObject({ issues: [{ rule: 'link' }] });
  expect(await studyFromHash('#results')).toBeUndefined();
});
