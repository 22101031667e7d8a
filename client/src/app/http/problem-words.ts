import { ApiProblem, FieldProblem, ProblemCode } from '#shared/api-problem';

type Parameters = Readonly<Record<string, string | number>>;
type Words = (parameters: Parameters) => string;

/** One catalogue from the codes of the API to sentences; the server sends no prose. */
const problemCatalogue: Readonly<Record<ProblemCode, Words>> = {
  invalid_input: () => $localize`Some answers need another look. They are marked below.`,
  malformed_body: () => $localize`What was sent could not be read. Reload the page and try again.`,
  not_found: () => $localize`There is nothing here that you may see. Check the address or number.`,
  not_signed_in: () => $localize`Sign in to go on. What you typed is kept.`,
  not_allowed: () => $localize`Your role does not allow this. The secretary of your club can help.`,
  wrong_credentials: () => $localize`The e-mail address and the password don't go together.`,
  too_many_requests: ({ retryAfterSeconds }) =>
    retryAfterSeconds
      ? $localize`Too many tries. Wait ${minutes(retryAfterSeconds)}:wait: and try again.`
      : $localize`Too many tries. Wait a few minutes and try again.`,
  csrf_refused: () => $localize`This page has been open too long. Reload it and try again.`,
  stale_version: () =>
    $localize`Someone changed this meanwhile. Your text is kept; load the newer version first.`,
  lease_needed: () => $localize`Claim the report before you decide on it.`,
  lease_taken: () => $localize`Another moderator is on this report just now.`,
  conflict_of_interest: () => $localize`You have a conflict of interest here, so others decide.`,
  own_report: () => $localize`This is your own report, so others decide.`,
  already_decided: () => $localize`This has been decided already.`,
  second_voice_same_club: () =>
    $localize`The second voice must come from a moderator of another club.`,
  report_number_mistyped: () =>
    $localize`This report number has a slip in it: its last character does not fit the rest.`,
  link_used_or_expired: () => $localize`This link was used already, or it is too old.`,
  photo_too_large: () => $localize`The photo is larger than 25 MB. Save it smaller and try again.`,
  photo_too_many_pixels: () =>
    $localize`The photo has more than 60 million pixels. Save it smaller and try again.`,
  photo_not_an_image: () => $localize`This is no JPEG, PNG or WebP picture.`,
  photo_damaged: () => $localize`The picture is damaged and cannot be opened.`,
  photo_in_use: () => $localize`This photo belongs to a filed report and stays with it.`,
  paper_money_not_taken: () =>
    $localize`Touchneedle takes coins, tokens, medals and bars, but no paper money. Your central \
bank's counterfeit desk will take the note.`,
  last_secretary: () => $localize`A club needs one secretary at least. Name another one first.`,
  address_known: () => $localize`This e-mail address has an account already. Sign in instead.`,
  body_too_large: () => $localize`This is more than can be taken at once. Shorten it, please.`,
  unavailable: () => $localize`The registry does not answer just now. Nothing of yours is lost.`,
  unexpected: () => $localize`Something went wrong on our side. Try again in a moment.`,
};

/** Codes of single fields; a code not listed reads as "not accepted". */
const fieldCatalogue: Readonly<Record<string, Words>> = {
  required: () => $localize`This is needed.`,
  wrong_type: () => $localize`This is not in the form asked for.`,
  not_one_of: () => $localize`Choose one of those offered.`,
  too_small: ({ minimum }) =>
    minimum === undefined
      ? $localize`This is too small.`
      : $localize`${minimum}:minimum: at least.`,
  too_big: ({ maximum }) =>
    maximum === undefined
      ? $localize`This is too large.`
      : $localize`${maximum}:maximum: at most.`,
  too_short: ({ minimum }) =>
    minimum === undefined || Number(minimum) <= 1
      ? $localize`This is needed.`
      : $localize`${minimum}:minimum: characters at least.`,
  too_long: ({ maximum }) =>
    maximum === undefined
      ? $localize`This is too long.`
      : $localize`${maximum}:maximum: characters at most.`,
  not_an_address: () => $localize`This is no e-mail address.`,
  not_a_time_zone: () => $localize`This time zone is not known.`,
  not_a_slug: () => $localize`Small letters, digits and single hyphens only.`,
  wrong_password: () => $localize`This is not your present password.`,
  password_too_short: () => $localize`Twelve characters at least.`,
  password_too_long: () =>
    $localize`At most 72 bytes (fewer letters where they carry accents): no more can be kept.`,
  password_too_common: () =>
    $localize`This is among the first that anyone would try. Four unrelated words do well.`,
  only_when_publishing: () => $localize`This goes with a publication only.`,
  confirmed_needs_piece: () => $localize`"Confirmed" needs the piece in hand.`,
  confirmed_needs_test: () =>
    $localize`"Confirmed" needs one objective test outside its limits.`,
};

/** The sentence for a problem, with the request's id where the server gives one. */
export function problemWords(problem: ApiProblem): string {
  const sentence = problemCatalogue[problem.code](problem.parameters ?? {});
  return problem.requestId
    ? $localize`${sentence}:sentence: If it stays, tell the registrar this: \
${problem.requestId}:requestId:`
    : sentence;
}

/** The words for one field at fault. */
export function fieldProblemWords(problem: Pick<FieldProblem, 'code' | 'parameters'>): string {
  const words = fieldCatalogue[problem.code];
  return words ? words(problem.parameters ?? {}) : $localize`This was not accepted.`;
}

function minutes(seconds: string | number): string {
  const count = Math.max(1, Math.ceil(Number(seconds) / 60));
  return count === 1 ? $localize`one minute` : $localize`${count}:count: minutes`;
}
