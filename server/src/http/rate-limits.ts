import type { Request, RequestHandler } from 'express';
import { rateLimit } from 'express-rate-limit';
import type { Endpoint } from '../contract/endpoint.ts';
import { HttpProblem } from './problem.ts';

type Limited = NonNullable<Endpoint['limited']>;

/** Tries in a quarter of an hour: by address and kind of call, and by the e-mail that a call names. */
export type RateLimits = Record<Limited | 'same e-mail', number>;

/**
 * Several people may share an address, so the numbers are above what one office needs and far below what guessing
 * passwords of 10 characters or flooding a mailbox would.
 */
export const defaultRateLimits: RateLimits = { 'sign-in': 60, 'sign-up': 60, mail: 30, 'same e-mail': 20 };

const WINDOW_MS = 15 * 60_000;

/** Counters for each kind of call. Of signing in, only failures count. */
export function rateLimiters(limits: RateLimits): Record<Limited, RequestHandler[]> {
  const countersOf = (kind: Limited) => {
    const skipSuccessfulRequests = kind === 'sign-in';
    return [
      limiter({ limit: limits[kind], skipSuccessfulRequests }),
      limiter({
        limit: limits['same e-mail'],
        skipSuccessfulRequests,
        skip: (req) => emailOf(req) === null,
        keyGenerator: (req) => emailOf(req) ?? '',
      }),
    ];
  };
  return { 'sign-in': countersOf('sign-in'), 'sign-up': countersOf('sign-up'), mail: countersOf('mail') };
}

function limiter(options: Parameters<typeof rateLimit>[0]): RequestHandler {
  return rateLimit({
    windowMs: WINDOW_MS,
    standardHeaders: 'draft-7',
    legacyHeaders: false,
    ...options,
    handler: (_req, _res, next) => {
      next(new HttpProblem('TOO_MANY_REQUESTS', 'Too many tries. Wait a quarter of an hour.'));
    },
  });
}

function emailOf({ body }: Request): string | null {
  const { email } = (body ?? {}) as { email?: unknown };
  return typeof email === 'string' ? email.toLowerCase() : null;
}
