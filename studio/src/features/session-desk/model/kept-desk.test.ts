import { expect, test } from 'vitest';
import { deskReducer, freshDesk, type DeskAction } from './desk-state.ts';
import { keptDeskText, readKeptDesk } from './kept-desk.ts';
import { sampleStudy } from './sample-study.ts';

test('readKeptDesk brings back the draft, what waits in it, the baseline, undo and the view', () => {
  const actions: DeskAction[] = [
    { type: 'keep-baseline' },
    { type: 'entry', path: 'station.currentMaxA', entry: '35o', label: 'Current, most' },
    { type: 'view', view: { axis: 'soc', hiddenStrips: ['anode'] } },
  ];
  const desk = actions.reduce(deskReducer, freshDesk(sampleStudy));
  const read = readKeptDesk(keptDeskText(desk));
  expect(read).toEqual({ desk: { ...desk, typingAt: null, future: [] } });
});

test('readKeptDesk says why a study can no longer be run', () => {
  const desk = freshDesk({ ...sampleStudy, station: { ...sampleStudy.station, currentMaxA: -1 } });
  expect(readKeptDesk(keptDeskText(desk))).toMatchObject({ issues: [{ path: 'station.currentMaxA' }] });
  for (const text of ['', '{', '{}', 'null', '{"version":1}']) expect(readKeptDesk(text)).toHaveProperty('issues');
});
