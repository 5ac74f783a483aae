import { parseStudy } from '@voltiplano/engine';
import { expect, test } from 'vitest';
import { sampleStudy } from './sample-study.ts';
import { taperInShape, taperShapes } from './taper-shapes.ts';

test('taperInShape makes a taper the engine takes, from every shape to every other', () => {
  const { strategy, pack } = sampleStudy;
  for (const from of taperShapes)
    for (const to of taperShapes) {
      const first = taperInShape(strategy.taper, from.shape, 4.17, pack.chargeCurrentMaxA);
      const taper = taperInShape(first, to.shape, 4.17, pack.chargeCurrentMaxA);
      expect(taper.shape).toBe(to.shape);
      expect(() => parseStudy({ ...sampleStudy, strategy: { ...strategy, taper } })).not.toThrow();
    }
});

test('taperInShape keeps socs and values between slope and ledges', () => {
  const slope = taperInShape(sampleStudy.strategy.taper, 'slope', 4.17, 380);
  expect(slope).toEqual({
    shape: 'slope',
    unit: 'A',
    points: [
      { soc: 0, value: 360 },
      { soc: 0.3, value: 310 },
      { soc: 0.5, value: 230 },
    ],
  });
});
