import { z } from 'zod';
import { idSchema } from './common.ts';

/** Somebody who did something; null where the account is gone. */
export const personRefSchema = z
  .object({ id: idSchema, name: z.string() })
  .nullable()
  .meta({ id: 'PersonRef', description: 'Who did it; null where the account is gone' });
export type PersonRef = z.infer<typeof personRefSchema>;

export const orderSchema = z.enum(['asc', 'desc']);
