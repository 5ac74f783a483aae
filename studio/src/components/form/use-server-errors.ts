import { useState } from 'react';
import type { FieldValues, Path, UseFormReturn } from 'react-hook-form';
import type { ProblemCode } from '../../../../server/src/contract/problem.ts';
import { ApiProblem, problemSentence } from '../../lib/api/api-problem.ts';

/** Which field a problem is about that names none, such as EMAIL_TAKEN. */
export type FieldOfCode<V extends FieldValues> = Partial<Record<ProblemCode, Path<V>>>;

/**
 * Puts what the server refused beside the fields it is about.
 *
 * @returns  `formProblem`, the sentence that belongs to no field; `takeProblem` for what a call threw; `clear`
 */
export function useServerErrors<V extends FieldValues, C, T>(
  form: UseFormReturn<V, C, T>,
  fieldOfCode: FieldOfCode<V> = {},
) {
  const [formProblem, setFormProblem] = useState<string | null>(null);
  const takeProblem = (error: unknown) => {
    const { fields, rest } = sortProblem(error, Object.keys(form.getValues()), fieldOfCode);
    fields.forEach(({ field, message }, i) =>
      form.setError(field as Path<V>, { type: 'server', message }, { shouldFocus: i === 0 }),
    );
    setFormProblem(rest);
  };
  return { formProblem, takeProblem, clear: () => setFormProblem(null) };
}

/** A problem as messages of fields that the form has, and a sentence for what is left over. */
export function sortProblem<V extends FieldValues>(
  error: unknown,
  names: readonly string[],
  fieldOfCode: FieldOfCode<V>,
): { fields: { field: string; message: string }[]; rest: string | null } {
  if (!(error instanceof ApiProblem)) return { fields: [], rest: problemSentence(error) };
  const own = fieldOfCode[error.code];
  if (own) return { fields: [{ field: own, message: error.message }], rest: null };
  const found = error.errors.map(({ path, message }) => ({ field: path.replace(/^body\./, ''), message }));
  const fields = found.filter(({ field }) => names.includes(field.split('.')[0] ?? ''));
  const others = found.filter((one) => !fields.includes(one)).map(({ field, message }) => `${field}: ${message}`);
  if (found.length === 0) return { fields, rest: problemSentence(error) };
  return { fields, rest: others.length > 0 ? others.join('. ') : null };
}
