import { randomUUID } from 'node:crypto';
import type { ErrorRequestHandler, RequestHandler } from 'express';
import type { Logger } from 'pino';
import type { ApiProblem } from '#shared/api-problem';
import { isConnectionLost } from '../db/lost-connection';
import { InvalidInput, NotFound, ProblemError } from '../errors';

/** The last route under /api: what is not declared is not there. */
export const noSuchRoute: RequestHandler = () => {
  throw new NotFound();
};

/**
 * Writes every error as problem details. What nobody foresaw is a 500 without detail, logged once
 * with the request id that the answer carries.
 */
export function errorHandler(logger: Logger): ErrorRequestHandler {
  return (error: unknown, request, response, next) => {
    if (response.headersSent) return next(error);
    const known = toProblemError(error);
    if (known) {
      if (known.details.retryAfterSeconds) {
        response.set('Retry-After', String(known.details.retryAfterSeconds));
      }
      if (known.status >= 500) logger.error({ err: error, path: request.path }, known.code);
      send(known.toProblem());
      return;
    }
    const requestId = randomUUID();
    logger.error({ err: error, requestId, method: request.method, path: request.path },
      'unexpected error');
    send({ type: 'about:blank', title: 'Internal Server Error', status: 500, code: 'unexpected',
      requestId });

    function send(problem: ApiProblem): void {
      response.status(problem.status).type('application/problem+json')
        .set('Cache-Control', 'no-store').send(JSON.stringify(problem));
    }
  };
}

function toProblemError(error: unknown): ProblemError | undefined {
  if (error instanceof ProblemError) return error;
  if (!(error instanceof Error)) return undefined;
  const { type, status, code } = error as { type?: string; status?: number; code?: string };
  if (type === 'entity.too.large') return new ProblemError(413, 'body_too_large');
  if (type === 'entity.parse.failed' || type === 'encoding.unsupported'
      || type === 'charset.unsupported' || type === 'request.aborted'
      || type === 'request.size.invalid' || error instanceof URIError
      || (status === 400 && type !== undefined)) {
    return new ProblemError(400, 'malformed_body');
  }
  if (code === '22P02' || code === '22021' || code === '22P05') {
    return new InvalidInput([{ field: '', code: 'invalid' }]);
  }
  if (isConnectionLost(error)) {
    return new ProblemError(503, 'unavailable', { retryAfterSeconds: 5 });
  }
  return undefined;
}
