import { describe, expect, test } from 'vitest';
import { ApiProblem, Unreachable } from '../../lib/api/api-problem.ts';
import { sortProblem } from './use-server-errors.ts';

type Values = { email: string; points: { soc: number }[] };
const names = ['email', 'points'];
const problem = (
  code: 'INVALID_INPUT' | 'EMAIL_TAKEN' | 'FORBIDDEN',
  errors: { path: string; message: string }[] = [],
) =>
  new ApiProblem({
    type: 'about:blank',
    title: '',
    status: 422,
    detail: 'In one sentence.',
    code,
    requestId: '',
    errors,
  });
const sort = (error: unknown) => sortProblem<Values>(error, names, { EMAIL_TAKEN: 'email' });

describe('sortProblem', () => {
  test('puts messages beside fields that the form has, rows included', () => {
    const errors = [
      { path: 'body.email', message: 'Not an e-mail address' },
      { path: 'body.points.3.soc', message: 'soc must rise' },
    ];
    expect(sort(problem('INVALID_INPUT', errors))).toEqual({
      fields: [
        { field: 'email', message: 'Not an e-mail address' },
        { field: 'points.3.soc', message: 'soc must rise' },
      ],
      rest: null,
    });
  });

  test('says above the button what belongs to no field', () => {
    const errors = [{ path: 'header.Idempotency-Key', message: 'Must be visible' }];
    expect(sort(problem('INVALID_INPUT', errors))).toEqual({
      fields: [],
      rest: 'header.Idempotency-Key: Must be visible',
    });
    expect(sort(problem('FORBIDDEN')).rest).toBe('In one sentence.');
    expect(sort(new Unreachable('No answer')).rest).toMatch(/connection/);
  });

  test('puts a problem that names no field beside the one it is about', () => {
    expect(sort(problem('EMAIL_TAKEN')).fields).toEqual([{ field: 'email', message: 'In one sentence.' }]);
  });
});
