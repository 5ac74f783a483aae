import { z } from 'zod';
import { studySchema } from './schema.ts';

/** JSON Schema (draft 2020-12) of a study file as a person writes it, defaults left out. */
export function studyJsonSchema(): object {
  const schema = z.toJSONSchema(studySchema, { io: 'input', target: 'draft-2020-12', unrepresentable: 'any' });
  return { ...schema, $id: 'voltiplano/study/1', title: 'Voltiplano study, version 1' };
}
