import type { Knex } from 'knex';

export interface Scenario {
  readonly name: string;
  readonly as: 'member' | 'moderator';
  /** p95 in milliseconds that the registry is held to at 20 connections. */
  readonly target: number;
  /** Asked of a server just started, which has answered none of the paths yet. */
  readonly isFirstTime?: true;
  readonly warmingUp: readonly string[];
  readonly paths: readonly string[];
}

/** Paths that are asked again and again where the same ones are to come again. */
const distinct = 400;

export type Found = { readonly next: string | null; readonly total: { readonly count: number } };
/** Puts a request, as the member or as the moderator. */
export type Ask = Readonly<Record<'asMember' | 'asModerator', (path: string) => Promise<Found>>>;

/**
 * The stated mix. Search: 70 % words or filters with at most 5,000 hits and their counts, 20 % a
 * next page, 10 % unfiltered; once over so many filters that hardly one is asked twice, so that
 * every answer counts its hits anew, and once over filters that come again.
 */
export async function listScenarios(owner: Knex, ask: Ask): Promise<Scenario[]> {
  const filters = await narrowFilters(owner, ask);
  const pages = await nextPages(filters, ask);
  const mixOf = (some: readonly string[]): string[] =>
    Array.from({ length: Math.floor(some.length / 0.7) }, (_, at) => {
      const part = at % 10;
      if (part < 7) return some[Math.floor(at / 10) * 7 + part] ?? '/api/reports';
      return part < 9 ? pages[at % pages.length] ?? '/api/reports' : '/api/reports';
    });
  const numbers: string[] = await owner('report').where({ state: 'published' })
    .whereIn('published_audience', ['clubs', 'public']).orderByRaw('random()').limit(distinct)
    .pluck('number');
  const pagesOfReports = numbers.map((number) => `/api/reports/${number}`);
  const { next } = await ask.asModerator('/api/review/queue');
  const queue = ['/api/review/queue', `/api/review/queue?after=${next}`,
    '/api/review/queue?flag=public_asked', '/api/review/queue?flag=oldest'];
  const half = Math.floor(filters.length / 2);
  const few = mixOf(filters.slice(0, distinct * 0.7));
  return [
    { name: 'search, each filter for the first time', as: 'member', target: 200,
      isFirstTime: true, warmingUp: mixOf(filters.slice(half)),
      paths: mixOf(filters.slice(0, half)) },
    { name: 'search, filters asked before', as: 'member', target: 200, warmingUp: few,
      paths: few },
    { name: 'review queue', as: 'moderator', target: 150, warmingUp: queue, paths: queue },
    { name: 'report page', as: 'member', target: 100, warmingUp: pagesOfReports,
      paths: pagesOfReports },
  ];
}

async function narrowFilters(owner: Knex, ask: Ask): Promise<string[]> {
  const types: string[] = await owner('coin_type').orderBy('slug').pluck('slug');
  const tells: string[] = await owner('tell').where({ disclosure: 'public' }).pluck('id');
  const countries = ['GB', 'US', 'DE', 'NL', 'FR', 'NO', 'PL', 'AT', 'BE', 'IE', 'IT', 'ES'];
  const words = ['morgan', 'sovereign', 'purse', 'crown seam', 'bright field', 'rounded letters',
    'trade dollar', 'eagle', 'penny', 'libertad'];
  const of = (list: readonly string[], at: number): string => list[at % list.length] ?? '';
  const rounds = Array.from({ length: 16 }, (_, round) => round);
  const candidates = rounds.flatMap((round) => types.flatMap((type, at) => [
    `coinType=${type}&country=${of(countries, at + round)}`,
    `coinType=${type}&tell=${of(tells, at * 3 + round)}`,
    `coinType=${type}&yearFrom=${1800 + at + round * 7}&yearTo=${1840 + at + round * 7}`,
    `text=${encodeURIComponent(of(words, at + round))}&yearFrom=${1800 + at * 2 + round}&yearTo=${
      1825 + at * 2 + round * 2}`,
    `tell=${of(tells, at + round * 5)}&country=${of(countries, at * 5 + round)}&channel=auction`,
  ]));
  const narrow: string[] = [];
  const askEach = async (paths: Iterator<string>): Promise<void> => {
    for (let next = paths.next(); !next.done; next = paths.next()) {
      const { count } = (await ask.asMember(next.value)).total;
      if (count > 0 && count <= 5_000) narrow.push(next.value);
    }
  };
  const paths = [...new Set(candidates)].map((query) => `/api/reports?${query}`).values();
  await Promise.all(Array.from({ length: 4 }, () => askEach(paths)));
  return narrow;
}

async function nextPages(filters: readonly string[], ask: Ask): Promise<string[]> {
  const pages: string[] = [];
  for (const path of ['/api/reports', ...filters.slice(0, 80)]) {
    const { next } = await ask.asMember(path);
    if (next) pages.push(`${path}${path.includes('?') ? '&' : '?'}after=${next}`);
  }
  return pages;
}
