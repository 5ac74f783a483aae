import { expect, test } from 'vitest';
import { bytesPerEvaluation } from './allocation.ts';
import { timedStudy } from './studies.ts';

// A boxed number takes 16 bytes: one a segment shows as 176 bytes between one segment and twelve, an object or array a segment as
// 350 and more. The bound on a single call leaves room for how much a compiler inlines; about 90 were seen.
const A_FEW_NUMBERS = 180;

test('SessionSystem.derivative makes no objects: a few boxed numbers a call, no more for twelve segments than for one', async () => {
  const one = await bytesPerEvaluation(timedStudy('b1'));
  const twelve = await bytesPerEvaluation(timedStudy('b12'));
  expect(one).toBeLessThan(A_FEW_NUMBERS);
  expect(twelve - one).toBeLessThan(80);
});
