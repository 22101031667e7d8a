/**
 * What a refused request answers (RFC 9457 problem details, `application/problem+json`).
 * `code` and `parameters` say what is wrong; the client has the words for it.
 */
export interface ApiProblem {
  /** `about:blank`, or a relative reference that names the kind of problem. */
  readonly type: string;
  readonly title: string;
  readonly status: number;
  readonly code: ProblemCode;
  readonly parameters?: Readonly<Record<string, string | number>>;
  /** One row per field at fault. */
  readonly fields?: readonly FieldProblem[];
  /** Given with status 500 only, to be quoted to the registrar. */
  readonly requestId?: string;
}

export interface FieldProblem {
  /** The field's path in the body, dot-separated, such as `surfacing.country`. */
  readonly field: string;
  readonly code: string;
  readonly parameters?: Readonly<Record<string, string | number>>;
}

export const problemCodes = [
  'invalid_input',
  'malformed_body',
  'not_found',
  'not_signed_in',
  'not_allowed',
  'wrong_credentials',
  'too_many_requests',
  'csrf_refused',
  'stale_version',
  'lease_needed',
  'lease_taken',
  'conflict_of_interest',
  'own_report',
  'already_decided',
  'second_voice_same_club',
  'report_number_mistyped',
  'link_used_or_expired',
  'photo_too_large',
  'photo_too_many_pixels',
  'photo_not_an_image',
  'photo_damaged',
  'photo_in_use',
  'paper_money_not_taken',
  'last_secretary',
  'address_known',
  'body_too_large',
  'unavailable',
  'unexpected',
] as const;
export type ProblemCode = (typeof problemCodes)[number];
