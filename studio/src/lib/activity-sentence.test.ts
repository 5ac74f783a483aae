import { describe, expect, test } from 'vitest';
import type { Activity } from '../../../server/src/contract/workspace.ts';
import { activitySentence, type Piece } from './activity-sentence.ts';

const W = 'w0000000000000000000000000';
const deed = (action: string, detail: Record<string, string>, more: Partial<Activity> = {}): Activity => ({
  id: 'a',
  at: '2026-06-04T12:00:00.000Z',
  personId: 'p',
  personName: 'Rosa Mamani',
  action,
  subjectId: 's1',
  detail,
  ...more,
});
const told = (one: Activity) => activitySentence(W, one);
const text = (pieces: Piece[]) => pieces.map((piece) => (typeof piece === 'string' ? piece : piece.text)).join('');

describe('activitySentence', () => {
  test('tells deeds about people without a link', () => {
    const { pieces } = told(deed('invitation.sent', { email: 'tomas.apaza@puna.example', role: 'engineer' }));
    expect(pieces).toEqual(['Rosa Mamani ', 'invited tomas.apaza@puna.example as engineer']);
    expect(
      text(told(deed('member.roleChanged', { name: 'Tomás Apaza', from: 'analyst', to: 'engineer' })).pieces),
    ).toBe('Rosa Mamani changed Tomás Apaza from analyst to engineer');
  });

  test('leads to the study and to the part of the library', () => {
    const revised = told(
      deed('study.revised', { number: '26', title: 'Ledge at 36 %', revision: '6', message: 'Ledge down to 200 A' }),
    );
    expect(revised.pieces).toContainEqual({ to: `/w/${W}/studies/s1`, text: '26 Ledge at 36 %' });
    expect(text(revised.pieces)).toBe('Rosa Mamani revised study 26 Ledge at 36 %, revision 6');
    expect(revised.message).toBe('Ledge down to 200 A');
    const added = told(deed('library.added', { kind: 'pack', name: 'Vicuña 86', revision: '1' }));
    expect(added.pieces).toContainEqual({ to: `/w/${W}/library/s1`, text: 'pack Vicuña 86' });
  });

  test('calls cooling what the library calls cooling', () => {
    const revised = deed('library.revised', { kind: 'thermal', name: 'Vicuña loop, chiller 4.2 kW', revision: '3' });
    expect(text(told(revised).pieces)).toBe('Rosa Mamani revised the cooling Vicuña loop, chiller 4.2 kW, revision 3');
  });

  test('does not name the study whose page it stands on, and leads nowhere', () => {
    const revised = deed('study.revised', { number: '26', title: 'Ledge at 36 %', revision: '6' });
    expect(activitySentence(W, revised, 's1').pieces).toEqual(['Rosa Mamani ', 'revised this study', ', revision 6']);
    expect(activitySentence(W, revised, 's2').pieces).toEqual(told(revised).pieces);
    const archived = deed('study.archived', { number: '26', title: 'Ledge at 36 %' });
    expect(text(activitySentence(W, archived, 's1').pieces)).toBe('Rosa Mamani put this study into the archive');
  });

  test('says so where the account is gone, and names an action it does not know', () => {
    expect(text(told(deed('member.left', {}, { personName: null })).pieces)).toBe(
      'Somebody whose account is gone left the workspace',
    );
    expect(text(told(deed('study.weighed', {})).pieces)).toBe('Rosa Mamani did study.weighed');
  });
});
