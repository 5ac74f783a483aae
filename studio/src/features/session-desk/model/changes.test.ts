import { expect, test } from 'vitest';
import { changedPaths, isMoved } from './changes.ts';
import { sampleStudy } from './sample-study.ts';
import { withValueAt } from '../../../lib/study-path.ts';

test('changedPaths counts a field, a table and a part once each', () => {
  let study = withValueAt(sampleStudy, 'station.currentMaxA', 350);
  study = withValueAt(study, 'strategy.taper.steps', [{ fromSoc: 0, value: 100 }]);
  study = withValueAt(study, 'inlet', undefined);
  study = withValueAt(study, 'title', 'Another name');
  expect(changedPaths(study, sampleStudy).sort()).toEqual(['inlet', 'station.currentMaxA', 'strategy.taper.steps']);
  expect(changedPaths(sampleStudy, sampleStudy)).toEqual([]);
});

test('isMoved needs a baseline', () => {
  expect(isMoved(350, sampleStudy, 'station.currentMaxA')).toBe(true);
  expect(isMoved(500, sampleStudy, 'station.currentMaxA')).toBe(false);
  expect(isMoved(350, null, 'station.currentMaxA')).toBe(false);
});
