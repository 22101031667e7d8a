import { createHmac, randomBytes, timingSafeEqual } from 'node:crypto';
import { parseCookie } from 'cookie';
import type { Request, RequestHandler, Response } from 'express';
import { ProblemError } from '../errors';
import type { Config } from '../config';

const cookieName = 'XSRF-TOKEN';

/**
 * Signed double submit without state: the cookie that Angular reads holds `random.HMAC(random +
 * session id)`, and every write sends it back as X-XSRF-TOKEN. Nothing is stored, so a mere visitor
 * costs no row. Beside it, the Origin of a write must be this site.
 */
export function csrfProtection(config: Config): {
  readonly check: RequestHandler;
} {
  const check: RequestHandler = (request, _response, next) => {
    const origin = request.get('origin');
    if (origin !== undefined && origin !== config.baseUrl.origin) refuse();
    if (origin === undefined && request.get('sec-fetch-site') === 'cross-site') refuse();
    const sent = request.get('x-xsrf-token') ?? '';
    const cookie = parseCookie(request.get('cookie') ?? '')[cookieName] ?? '';
    if (sent === '' || sent !== cookie || !isSigned(sent, sessionOf(request), config)) refuse();
    next();
  };
  return { check };
}

/** Gives the browser a fresh token for its session; called by `GET /api/session` and sign-in. */
export function issueCsrfToken(request: Request, response: Response, config: Config): void {
  const random = randomBytes(16).toString('hex');
  response.cookie(cookieName, `${random}.${sign(random, sessionOf(request), config)}`, {
    sameSite: 'lax', secure: config.baseUrl.protocol === 'https:', path: '/',
  });
}

/** Visitors have no session row, hence no lasting id: theirs is the empty one. */
function sessionOf(request: Request): string {
  return request.session?.personId ? request.sessionID : '';
}

function sign(random: string, sessionId: string, config: Config): string {
  return createHmac('sha256', config.sessionSecret).update(`csrf|${random}|${sessionId}`)
    .digest('hex');
}

function isSigned(token: string, sessionId: string, config: Config): boolean {
  const [random = '', signature = ''] = token.split('.');
  const expected = Buffer.from(sign(random, sessionId, config));
  const given = Buffer.from(signature);
  return given.length === expected.length && timingSafeEqual(given, expected);
}

function refuse(): never {
  throw new ProblemError(403, 'csrf_refused');
}
