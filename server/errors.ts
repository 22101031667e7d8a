import type { ApiProblem, FieldProblem, ProblemCode } from '#shared/api-problem';

/** A refusal that the caller is told of, as RFC 9457 problem details. */
export class ProblemError extends Error {
  constructor(
    readonly status: number,
    readonly code: ProblemCode,
    readonly details: {
      readonly parameters?: Readonly<Record<string, string | number>>;
      readonly fields?: readonly FieldProblem[];
      readonly retryAfterSeconds?: number;
    } = {},
  ) {
    super(code);
    this.name = new.target.name;
  }

  toProblem(): ApiProblem {
    const { parameters, fields } = this.details;
    return {
      type: 'about:blank',
      title: titles[this.status] ?? 'Error',
      status: this.status,
      code: this.code,
      ...(parameters ? { parameters } : {}),
      ...(fields ? { fields } : {}),
    };
  }
}

const titles: Readonly<Record<number, string>> = {
  400: 'Bad Request', 401: 'Unauthorized', 403: 'Forbidden', 404: 'Not Found', 409: 'Conflict',
  413: 'Content Too Large', 415: 'Unsupported Media Type', 422: 'Unprocessable Content',
  429: 'Too Many Requests', 500: 'Internal Server Error', 503: 'Service Unavailable',
};

/** 404: there is no such thing, or the actor may not know of it. */
export class NotFound extends ProblemError {
  constructor() {
    super(404, 'not_found');
  }
}

/** 422: the input is well-formed but some fields are wrong. */
export class InvalidInput extends ProblemError {
  constructor(fields: readonly FieldProblem[]) {
    super(422, 'invalid_input', { fields });
  }
}

/** 403: the actor may know of the thing but not do this to it. */
export class NotAllowed extends ProblemError {
  constructor(code: ProblemCode = 'not_allowed') {
    super(403, code);
  }
}

/** 409: the state has moved on, or forbids it. */
export class Conflict extends ProblemError {
  constructor(code: ProblemCode, parameters?: Readonly<Record<string, string | number>>) {
    super(409, code, parameters ? { parameters } : {});
  }
}
