import type { RequestHandler } from 'express';
import { ipKeyGenerator, rateLimit } from 'express-rate-limit';
import { ProblemError } from '../errors';
import type { Config } from '../config';
import { callerOf } from './authenticate';
import type { RateLimit } from './route';

/** Requests a minute by kind, for a person or, for visitors, an address. */
const perMinute: Readonly<Record<RateLimit, number>> = {
  read: 600, write: 120, heavy: 60, credentials: 20,
};

/**
 * Limits kept in memory of the one server process: they guard against hammering, and are not part
 * of any guarantee.
 */
export function rateLimits(config: Config): Readonly<Record<RateLimit, RequestHandler>> {
  const make = (kind: RateLimit): RequestHandler => rateLimit({
    windowMs: 60_000,
    limit: perMinute[kind],
    standardHeaders: 'draft-8',
    legacyHeaders: false,
    identifier: kind,
    keyGenerator: (request) => callerOf(request)?.id ?? ipKeyGenerator(request.ip ?? ''),
    skip: () => !config.rateLimits,
    handler: () => {
      throw new ProblemError(429, 'too_many_requests', { retryAfterSeconds: 60 });
    },
  });
  return { read: make('read'), write: make('write'), heavy: make('heavy'),
    credentials: make('credentials') };
}
