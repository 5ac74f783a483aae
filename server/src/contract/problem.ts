import { z } from 'zod';

/** Every stable name of a problem, with its HTTP status and what it means. Names are added, never changed. */
export const problemCodes = {
  BAD_REQUEST: { status: 400, meaning: 'The request cannot be read' },
  NOT_SIGNED_IN: { status: 401, meaning: 'Nobody is signed in' },
  ACCESS_EXPIRED: { status: 401, meaning: 'The access token has expired; refresh it and ask again' },
  SESSION_ENDED: { status: 401, meaning: 'This device was signed out; sign in again' },
  REFRESH_REUSED: { status: 401, meaning: 'A spent refresh token came back; every token of the device has ended' },
  WRONG_CREDENTIALS: { status: 401, meaning: 'E-mail and password do not belong together' },
  API_TOKEN_INVALID: { status: 401, meaning: 'The API token is unknown, expired or revoked' },
  SESSION_REQUIRED: { status: 403, meaning: 'Only a signed-in person may do this, an API token may not' },
  ORIGIN_REFUSED: { status: 403, meaning: 'The request comes from another site' },
  CSRF_REFUSED: { status: 403, meaning: 'The X-CSRF-Token header is missing or wrong' },
  FORBIDDEN: { status: 403, meaning: 'The role does not permit this' },
  WRONG_PASSWORD: { status: 403, meaning: 'The present password is wrong' },
  INVITATION_FOR_OTHER: { status: 403, meaning: 'The invitation was sent to another e-mail' },
  NOT_FOUND: { status: 404, meaning: 'There is no such thing, or not for you' },
  EMAIL_TAKEN: { status: 409, meaning: 'An account has this e-mail' },
  ALREADY_MEMBER: { status: 409, meaning: 'The person belongs to the workspace already' },
  ALREADY_INVITED: { status: 409, meaning: 'An open invitation for this e-mail exists' },
  ARCHIVED: { status: 409, meaning: 'It lies in the archive; take it out before changing it' },
  UNCHANGED: { status: 409, meaning: 'The new revision would say what the newest one says' },
  ENTRIES_PENDING: { status: 409, meaning: 'The working copy has entries that break a rule; mend or undo them first' },
  LAST_OWNER: { status: 409, meaning: 'A workspace keeps at least one owner' },
  LINK_INVALID: { status: 410, meaning: 'The link is unknown, was used or has expired' },
  EDIT_CONFLICT: { status: 412, meaning: 'It was changed since the version that If-Match names; read it again' },
  BODY_TOO_LARGE: { status: 413, meaning: 'The body is larger than the server takes' },
  INVALID_INPUT: { status: 422, meaning: 'Fields of the request are wrong; `errors` names them' },
  IDEMPOTENCY_MISMATCH: { status: 422, meaning: 'The Idempotency-Key was used for another request' },
  IF_MATCH_MISSING: { status: 428, meaning: 'Say in If-Match which version the change was made from' },
  TOO_MANY_REQUESTS: { status: 429, meaning: 'Too many tries; wait as long as Retry-After says' },
  INTERNAL: { status: 500, meaning: 'The server failed; its log has the reason under the request id' },
  NOT_READY: { status: 503, meaning: 'The server cannot work yet' },
} as const satisfies Record<string, { status: number; meaning: string }>;

export type ProblemCode = keyof typeof problemCodes;

export const fieldErrorSchema = z
  .object({
    path: z.string().meta({
      description:
        'Part of the request and path of the field, rows by number from 0: `body.email`, `body.file.items.3.name`',
    }),
    message: z.string(),
  })
  .meta({ id: 'FieldError' });
export type FieldError = z.infer<typeof fieldErrorSchema>;

export const problemSchema = z
  .object({
    type: z.literal('about:blank').meta({ description: '`code` names the problem' }),
    title: z.string(),
    status: z.int(),
    detail: z.string().meta({ description: 'One sentence for people' }),
    code: z.enum(Object.keys(problemCodes) as [ProblemCode, ...ProblemCode[]]),
    requestId: z.string().meta({ description: 'The request, as in the log of the server' }),
    errors: z.array(fieldErrorSchema).optional(),
  })
  .meta({ id: 'Problem', description: 'Every error, as application/problem+json (RFC 9457)' });
export type Problem = z.infer<typeof problemSchema>;
