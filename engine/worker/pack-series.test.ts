import { expect, test } from 'vitest';
import { parseSessionStudy, simulateSession, thermalAnalysis, type SessionStudyInput } from '../src/index.ts';
import { timedStudy } from '../bench/studies.ts';
import { packAnswer, unpackAnswer } from './pack-series.ts';

function answerOf(input: SessionStudyInput) {
  const parsed = parseSessionStudy(input);
  return { result: simulateSession(parsed, { everyS: 60 }).result, thermal: thermalAnalysis(parsed, 5000), ms: 1.5 };
}

const withAnode: SessionStudyInput = timedStudy('b1');
const { anode: _, ...cellWithoutAnode } = withAnode.cell;
const { anodeMarginMv: __, ...strategyWithoutMargin } = withAnode.strategy;
const withoutAnode = { ...withAnode, cell: cellWithoutAnode, strategy: strategyWithoutMargin };

test('packAnswer moves every column of numbers into one block and leaves the answer it was given as it is', () => {
  const answer = answerOf(withAnode);
  const before = structuredClone(answer);
  const packed = packAnswer(answer);
  expect(packed.block.byteLength).toBe(8 * packed.rows * packed.names.length);
  expect(packed.names).toHaveLength(Object.keys(answer.result.series).length - 1);
  expect(packed.names).not.toContain('limit');
  expect(packed.answer.result.series.soc).toEqual([]);
  expect(answer).toEqual(before);
});

test('unpackAnswer gives the packed answer back to the last bit', () => {
  const answer = answerOf(withAnode);
  answer.result.series.packCurrentA[1] = -0;
  const transferred = structuredClone(packAnswer(answer));
  expect(unpackAnswer(transferred)).toStrictEqual(answer);
});

test('unpackAnswer keeps the nulls of a cell without an anode, and of a column that has some', () => {
  const answer = answerOf(withoutAnode);
  expect(answer.result.series.lowestAnodeV.every((value) => value === null)).toBe(true);
  expect(unpackAnswer(structuredClone(packAnswer(answer)))).toStrictEqual(answer);
  answer.result.series.lowestAnodeV[3] = 0.05;
  expect(unpackAnswer(structuredClone(packAnswer(answer)))).toStrictEqual(answer);
});
