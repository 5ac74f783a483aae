import { expect, test } from 'vitest';
import { sectionShape, type PowerSection } from './section-shape.ts';
import { sectionWords } from './section-words.ts';

const frame = { untilMin: 180, width: 360, height: 40, depth: 8 };
const section: PowerSection = {
  endMin: 90,
  // Climbs, jumps down at minute 30, falls to nought.
  points: [
    [0, 80],
    [30, 100],
    [30, 50],
    [90, 0],
  ],
  limits: [
    { limit: 'pack-current', fromMin: 0, toMin: 30 },
    { limit: 'taper', fromMin: 30, toMin: 60 },
    { limit: 'cell-voltage', fromMin: 60, toMin: 90 },
  ],
};

test('sectionShape draws 2 px per minute, the upper edge being the first scale that holds the peak', () => {
  const shape = sectionShape(section, frame);
  expect(shape.scaleKw).toBe(100);
  expect(shape.line).toBe('M0 8L60 0L60 20L180 40');
  expect(shape.ground).toBe('M0 8L60 0L60 20L180 40L180 40L0 40Z');
  expect(shape.isCut).toBe(false);
});

test.each([
  [25, 25],
  [25.1, 50],
  [100.1, 200],
  [350, 400],
])('a peak of %d kW is drawn on a scale of %d kW', (peakKw, scaleKw) => {
  expect(sectionShape({ ...section, points: [[0, peakKw]] }, frame).scaleKw).toBe(scaleKw);
});

test('beds meet at the moment of the hand-over, each on its own side of a jump, and never pass the foot', () => {
  const { beds } = sectionShape(section, frame);
  expect(beds.map(({ limit }) => limit)).toEqual(['pack-current', 'taper', 'cell-voltage']);
  expect(beds[0]!.path).toBe('M0 8L60 0L60 8L0 16Z');
  expect(beds[1]!.path).toBe('M60 20L120 30L120 38L60 28Z');
  expect(beds[2]!.path).toBe('M120 30L180 40L180 40L120 38Z');
});

test('a bed narrower than two pixels passes into the one before it', () => {
  const limits: PowerSection['limits'] = [
    { limit: 'taper', fromMin: 0, toMin: 40 },
    { limit: 'hot', fromMin: 40, toMin: 40.9 },
    { limit: 'taper', fromMin: 40.9, toMin: 60 },
    { limit: 'hot', fromMin: 60, toMin: 61 },
    { limit: 'taper', fromMin: 61, toMin: 90 },
  ];
  const { beds } = sectionShape({ ...section, limits }, frame);
  expect(beds.map(({ limit, fromMin }) => [limit, fromMin])).toEqual([
    ['taper', 0],
    ['hot', 60],
    ['taper', 61],
  ]);
});

test('a session longer than the axis is cut at its end', () => {
  const points: PowerSection['points'] = [
    [0, 20],
    [360, 20],
  ];
  const limits: PowerSection['limits'] = [
    { limit: 'station-power', fromMin: 0, toMin: 170 },
    { limit: 'taper', fromMin: 170, toMin: 300 },
    { limit: 'cell-voltage', fromMin: 300, toMin: 360 },
  ];
  const shape = sectionShape({ endMin: 360, points, limits }, frame);
  expect(shape.isCut).toBe(true);
  expect(shape.line).toBe('M0 8L360 8');
  expect(shape.beds.map(({ path }) => path)).toEqual(['M0 8L340 8L340 16L0 16Z', 'M340 8L360 8L360 16L340 16Z']);
});

test('a curve that stands high near the right edge is told, so that no words are written over it', () => {
  const level = (endMin: number, kw: number): PowerSection => ({ endMin, points: [[0, kw]], limits: [] });
  expect(sectionShape(level(180, 20), frame).isHighAtEnd).toBe(true);
  expect(sectionShape(level(180, 12), frame).isHighAtEnd).toBe(false);
  expect(sectionShape(level(130, 20), frame).isHighAtEnd).toBe(false);
});

test('a session without a point draws nothing', () => {
  const shape = sectionShape({ endMin: 0, points: [], limits: [] }, frame);
  expect(shape).toMatchObject({ line: '', ground: '', beds: [] });
});

test('sectionWords names the peak and the minutes of each limit, longest first, its spans added up', () => {
  const limits = [...section.limits, { limit: 'pack-current' as const, fromMin: 90, toMin: 95.5 }];
  expect(sectionWords({ ...section, limits })).toBe(
    'Power over 90.0 min, 100.0 kW at most. Held by pack current 35.5 min, taper 30.0 min, voltage ceiling 30.0 min',
  );
});
