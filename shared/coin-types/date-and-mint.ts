import type { IssueView } from '../catalogue/coin-type-view';
import type { DateTable } from './coin-type-standard';

/**
 * What the table of a coin type says of a date and mint mark:
 * `struck`; `never_struck` for this type; `none_or_few` (struck but none released, or few known:
 * an extraordinary claim); `not_in_table` (the table does not reach that far: says nothing).
 */
export const dateAndMintAnswers = ['struck', 'never_struck', 'none_or_few',
  'not_in_table'] as const;
export type DateAndMintAnswer = (typeof dateAndMintAnswers)[number];

export interface DateAndMintFinding {
  readonly answer: DateAndMintAnswer;
  /** How many are known, where a number is given; 0 where none was released. */
  readonly knownCount: number | null;
  readonly proofOnly: boolean;
  readonly note: string;
  readonly source: string;
  /** False where no mint mark was given, or the table does not tell mints apart. */
  readonly mintCompared: boolean;
}

type Issue = Pick<IssueView, 'year' | 'mintMark' | 'state' | 'knownCount' | 'note' | 'source'>;

/**
 * Looks a date and mint mark up. `mintMark` is what stands on the piece: '' where there is none,
 * null where it was not said (then the date alone is judged). `P` is read as no mint mark where
 * the table has Philadelphia without one, as the trade writes it.
 */
export function findDateAndMint(issues: readonly Issue[], table: DateTable | null, year: number,
  mintMark: string | null): DateAndMintFinding {
  const ofYear = issues.filter((issue) => issue.year === year);
  const mintCompared = mintMark !== null && !(table?.anyMintMark ?? false);
  const matching = mintCompared ? ofMint(ofYear, mintMark) : ofYear;
  const strongest = [...matching].sort((a, b) => strength(a) - strength(b))[0];
  if (strongest) return { ...describe(strongest), mintCompared };
  const reached = table !== null && table.complete
    && (table.through === null || year <= table.through);
  return { answer: reached ? 'never_struck' : 'not_in_table', knownCount: null, proofOnly: false,
    note: '', source: table?.source ?? '', mintCompared };
}

/** Pairs of date and mint mark that a piece may honestly bear, proofs among them. */
export function countStruckPairs(issues: readonly Issue[]): number {
  return new Set(issues.filter(({ state }) => state === 'struck' || state === 'proof_only')
    .map((issue) => `${issue.year} ${issue.mintMark}`)).size;
}

function ofMint(issues: readonly Issue[], mintMark: string): readonly Issue[] {
  const wanted = mintMark.trim().toUpperCase();
  const exact = issues.filter((issue) => issue.mintMark.toUpperCase() === wanted);
  return exact.length === 0 && wanted === 'P'
    ? issues.filter((issue) => issue.mintMark === '') : exact;
}

/** Where several rows fit, the one that speaks most for the piece is answered. */
function strength(issue: Issue): number {
  return ['struck', 'proof_only', 'few_known', 'none_released', 'never_struck']
    .indexOf(issue.state);
}

function describe(issue: Issue): Omit<DateAndMintFinding, 'mintCompared'> {
  const { note, source, knownCount } = issue;
  switch (issue.state) {
    case 'struck': return { answer: 'struck', knownCount, proofOnly: false, note, source };
    case 'proof_only': return { answer: 'struck', knownCount, proofOnly: true, note, source };
    case 'few_known': return { answer: 'none_or_few', knownCount, proofOnly: false, note, source };
    case 'none_released':
      return { answer: 'none_or_few', knownCount, proofOnly: false, note, source };
    case 'never_struck':
      return { answer: 'never_struck', knownCount, proofOnly: false, note, source };
  }
}
