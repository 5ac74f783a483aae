import { z } from 'zod';

export const idSchema = z
  .string()
  .regex(/^[0-9a-hjkmnp-tv-z]{26}$/, 'Not an identifier')
  .meta({ id: 'Id', description: '128 random bits in Crockford base 32' });

export const momentSchema = z.iso.datetime().meta({ id: 'Moment', description: 'RFC 3339, UTC' });

export const emailSchema = z.email('Not an e-mail address').max(254).toLowerCase();

export const personNameSchema = z.string().trim().min(1, 'A name is needed').max(100);

export const passwordSchema = z.string().min(10, 'At least 10 characters').max(200, 'At most 200 characters');

export const oneTimeTokenSchema = z.string().min(1).max(100);

export const pageQuerySchema = z.object({
  cursor: z.string().max(4000).optional().meta({ description: '`nextCursor` of the page before' }),
  limit: z.coerce.number().int().min(1).max(200).default(50),
});
export type PageQuery = z.infer<typeof pageQuerySchema>;

/** A page of a list: its items, and the cursor that the next page starts at, null on the last. */
export function pageOf<T extends z.ZodType>(item: T) {
  return z.object({ items: z.array(item), nextCursor: z.string().nullable() });
}
export type Page<T> = { items: T[]; nextCursor: string | null };
