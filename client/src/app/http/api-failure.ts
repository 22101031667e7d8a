import { HttpErrorResponse } from '@angular/common/http';
import { ApiProblem, problemCodes } from '#shared/api-problem';

/** What every failed request of the app throws: the server's problem document, typed. */
export class ApiFailure extends Error {
  constructor(
    readonly problem: ApiProblem,
    override readonly cause?: unknown,
  ) {
    super(`${problem.status} ${problem.code}`);
    this.name = 'ApiFailure';
  }
}

/** Status 0 stands for an answer that never came: no network, or the server is down. */
export function isNetworkFailure(problem: ApiProblem): boolean {
  return problem.status === 0;
}

/** The problem behind anything thrown; what is no failed request reads as `unexpected`. */
export function problemOf(error: unknown): ApiProblem {
  if (error instanceof ApiFailure) return error.problem;
  if (error instanceof HttpErrorResponse) return problemOfResponse(error);
  return { type: 'about:blank', title: '', status: 500, code: 'unexpected' };
}

function problemOfResponse(response: HttpErrorResponse): ApiProblem {
  // Asked for as text or blob, an error body comes unparsed.
  const body: unknown =
    typeof response.error === 'string' ? parsed(response.error) : response.error;
  if (isApiProblem(body)) return body;
  return {
    type: 'about:blank',
    title: '',
    status: response.status,
    code: codeOfStatus(response.status),
  };
}

function parsed(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return undefined;
  }
}

function isApiProblem(body: unknown): body is ApiProblem {
  if (typeof body !== 'object' || body === null || !('code' in body) || !('status' in body)) {
    return false;
  }
  const known: readonly string[] = problemCodes;
  return typeof body.code === 'string' && known.includes(body.code);
}

function codeOfStatus(status: number): ApiProblem['code'] {
  switch (status) {
    case 0:
    case 502:
    case 503:
    case 504:
      return 'unavailable';
    case 401:
      return 'not_signed_in';
    case 403:
      return 'not_allowed';
    case 404:
      return 'not_found';
    case 413:
      return 'body_too_large';
    case 429:
      return 'too_many_requests';
    default:
      return 'unexpected';
  }
}
