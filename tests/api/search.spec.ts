import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { ApiProblem } from '#shared/api-problem';
import type { ReportContent } from '#shared/reports/report-content';
import type { ReportSearchAnswer, SearchSuggestion } from '#shared/reports/report-view';
import { searchQuery } from '#server/reports/report-search-schemas';
import { createReportSearchService } from '#server/reports/report-search-service';
import { createKeptTotals } from '#server/reports/search-totals';
import { addClub, addMember, type TestClub,
  type TestPerson } from '#tests/support/factories/people';
import { fileReport, publishReport, reportContent } from '#tests/support/factories/reports';
import { startTestApp, type TestApp } from '#tests/support/test-app';
import type { TestClient } from '#tests/support/test-client';

let app: TestApp;
let club: TestClub;
let member: TestPerson;
let author: TestClient;
let visitor: TestClient;
const numbers: Record<string, string> = {};

/** Five public reports, one for the clubs, one for a club alone; each a day after the other. */
beforeAll(async () => {
  app = await startTestApp();
  club = await addClub(app.store.owner);
  member = await addMember(app.store.owner, club);
  author = await app.client().signIn(member.email);
  visitor = app.client();
  const free = (description: string, kind: 'coin' | 'token', metal: 'gold' | 'brass') =>
    ({ coinType: null, kind, metal, description, year: null, mintMark: '' });
  const { presentedAs, surfacing } = reportContent(club);
  const publicTell = await app.store.owner('tell').where({ disclosure: 'public' }).first('id');
  const clubsTell = await app.store.owner('tell').where({ disclosure: 'clubs' }).first('id');
  const tell = (tellId: string) => ({ tellId, note: '', disclosure: 'public' as const, pins: [] });
  const finds: [string, Partial<ReportContent>][] = [
    ['crown', { audience: 'public', tells: [tell(publicTell.id), tell(clubsTell.id)] }],
    ['laterCrown', { audience: 'public', presentedAs: { ...presentedAs, year: 1899 } }],
    ['goldPiece', { audience: 'public', presentedAs: free('Harbour ducat', 'coin', 'gold') }],
    ['token', { audience: 'public', presentedAs: free('Ferry token Brückenzoll', 'token', 'brass'),
      surfacing: { ...surfacing, channel: 'auction', country: 'DE' } }],
    ['goldToken', { audience: 'public', presentedAs: free('Harbour medalet', 'token', 'gold') }],
    ['forClubs', { audience: 'clubs', account: '<p>unmistakable zebrawood box</p>',
      presentedAs: free('Silent groat', 'coin', 'gold') }],
    ['forClub', { audience: 'club', presentedAs: free('Whispered groat', 'coin', 'gold') }],
  ];
  for (const [index, [name, changes]] of finds.entries()) {
    const number = await fileReport(author, reportContent(club, changes));
    numbers[name] = number;
    await publishReport(app.store.owner, number, { audience: changes.audience ?? 'clubs',
      at: `2026-04-0${index + 1}T12:00:00Z` });
  }
});
afterAll(() => app.stop());

async function search(query: string, by: TestClient = visitor): Promise<ReportSearchAnswer> {
  const answer = await by.get<ReportSearchAnswer>(`/api/reports?${query}`);
  expect(answer.status, answer.text).toBe(200);
  return answer.body;
}
/** The names of what was found, in its order. */
async function found(query: string, by: TestClient = visitor): Promise<string[]> {
  const { items } = await search(query, by);
  return items.map((item) => Object.keys(numbers)
    .find((name) => numbers[name] === item.number) ?? item.number);
}
const facet = (answer: ReportSearchAnswer, name: keyof NonNullable<ReportSearchAnswer['facets']>) =>
  Object.fromEntries((answer.facets?.[name] ?? []).map(({ value, count }) => [value, count]));

describe('search', () => {
  it('lists what the reader may read, the newest publication first', async () => {
    expect(await found('')).toEqual(['goldToken', 'token', 'goldPiece', 'laterCrown', 'crown']);
    expect(await found('', author)).toEqual(['forClub', 'forClubs', 'goldToken', 'token',
      'goldPiece', 'laterCrown', 'crown']);
    const other = await addMember(app.store.owner, await addClub(app.store.owner));
    expect(await found('', await app.client().signIn(other.email)))
      .toEqual(['forClubs', 'goldToken', 'token', 'goldPiece', 'laterCrown', 'crown']);
  });

  it('finds all words, the last one also by its beginning, accents or not', async () => {
    expect(await found('text=harbour')).toEqual(['goldToken', 'goldPiece']);
    expect(await found('text=harbour+duc')).toEqual(['goldPiece']);
    expect(await found('text=bruckenzoll')).toEqual(['token']);
    expect(await found('text=quillhaven+1899')).toEqual(['laterCrown']);
    expect(await found('text=%22ferry+token%22')).toEqual(['token']);
    expect(await found('text=harbour+-ducat')).toEqual(['goldToken']);
    expect(await found('text=!!+%3A*+()')).toHaveLength(5);
  });

  it('reads the account of a report in the clubs only', async () => {
    expect(await found('text=zebrawood')).toEqual([]);
    expect(await found('text=zebrawood', author)).toEqual(['forClubs']);
  });

  it('adds facets up, and takes the values of one as alternatives', async () => {
    expect(await found('metal=gold&kind=token')).toEqual(['goldToken']);
    expect(await found('metal=gold&metal=brass&kind=token')).toEqual(['goldToken', 'token']);
    expect(await found('coinType=quillhaven-crown&yearFrom=1895&yearTo=1900'))
      .toEqual(['laterCrown']);
    expect(await found('country=DE&channel=auction&confidence=probable')).toEqual(['token']);
  });

  it('counts each facet without its own selection', async () => {
    const open = await search('');
    expect(facet(open, 'metal')).toEqual({ silver: 2, gold: 2, brass: 1 });
    expect(open.total).toEqual({ count: 5, more: false });
    const one = await search('metal=gold');
    expect(facet(one, 'metal')).toEqual({ silver: 2, gold: 2, brass: 1 });
    expect(facet(one, 'kind')).toEqual({ coin: 1, token: 1 });
    expect(one.total.count).toBe(2);
    const two = await search('metal=gold&kind=token');
    expect(facet(two, 'metal')).toEqual({ gold: 1, brass: 1 });
    expect(facet(two, 'kind')).toEqual({ coin: 1, token: 1 });
    expect(two.total.count).toBe(1);
  });

  it('knows of a tell only as far as it is disclosed', async () => {
    const [hidden] = await app.store.owner('report_tell').where({ disclosure: 'clubs' })
      .select('tell_id');
    expect(await found(`tell=${hidden.tell_id}`)).toEqual([]);
    expect(facet(await search(''), 'tell')).not.toHaveProperty(hidden.tell_id);
    expect(await found(`tell=${hidden.tell_id}`, author)).toEqual(['crown']);
    expect(facet(await search('', author), 'tell')).toMatchObject({ [hidden.tell_id]: 1 });
  });

  it('mends a slip of spelling where a word finds nothing, unless told not to', async () => {
    const mended = await search('text=quilhaven');
    expect(mended.mended).toEqual({ from: 'quilhaven', to: 'quillhaven' });
    expect(mended.items).toHaveLength(2);
    expect(facet(mended, 'metal')).toEqual({ silver: 2 });
    expect((await search('text=quilhaven&exact=1')).items).toEqual([]);
    expect((await search('text=Quillhaven')).mended).toBeNull();
    expect((await search('text=qiullhaven+1899')).mended?.to).toBe('quillhaven 1899');
    // Words that are right but do not stand together are not another word's slip.
    expect((await search('text=harbour+quillhaven')).mended).toBeNull();
  });

  it('goes by a whole number first, and says that one is mistyped', async () => {
    const number = numbers['token'] ?? '';
    const answer = await search(`text=${number.replaceAll('-', '+').toLowerCase()}`);
    expect(answer.number).toBe(number);
    expect(answer.items.map((item) => item.number)).toEqual([number]);
    const serial = number.slice(6, 11);
    const wrong = String((Number(serial) + 1) % 100_000).padStart(5, '0');
    expect(await search(`text=${number.replace(serial, wrong)}`))
      .toMatchObject({ number: null, numberMistyped: true, items: [] });
    expect((await search(`text=${numbers['forClubs']}`)).number).toBeNull();
  });

  it('pages by key: each once, none lost when something new comes', async () => {
    const first = await search('limit=2');
    const number = await fileReport(author, reportContent(club, { audience: 'public' }));
    await publishReport(app.store.owner, number, { audience: 'public' });
    numbers['new'] = number;
    const second = await search(`limit=2&after=${first.next}`);
    const third = await search(`limit=2&after=${second.next}`);
    const all = [first, second, third].flatMap(({ items }) => items.map((item) => item.number));
    expect(all).toEqual(['goldToken', 'token', 'goldPiece', 'laterCrown', 'crown']
      .map((name) => numbers[name]));
    expect(third.next).toBeNull();
    expect(second.facets).toBeNull();
    expect(second.total).toEqual(first.total);
    const forged = await visitor.get<ApiProblem>('/api/reports?after=bm90IG91cnM');
    expect([forged.status, forged.body.fields?.[0]?.field]).toEqual([422, 'after']);
  });

  it('renews its totals when something is published', async () => {
    const before = (await search('')).total.count;
    const number = await fileReport(author, reportContent(club, { audience: 'public' }));
    expect((await search('')).total.count).toBe(before);
    await publishReport(app.store.owner, number, { audience: 'public' });
    await expect.poll(async () => (await search('')).total.count).toBe(before + 1);
  });

  it.each(['', 'metal=silver', 'text=quillhaven&metal=silver&kind=coin'])(
    'makes the same number of statements for one row and for fifty (%s)', async (query) => {
      const count = async (limit: number): Promise<number> => {
        let statements = 0;
        const service = createReportSearchService(createKeptTotals(Date.now));
        await app.database.asActor({ kind: 'visitor' }, async (trx) => {
          trx.on('query', () => { statements += 1; });
          await service.search(trx, searchQuery.parse({
            ...Object.fromEntries(new URLSearchParams(query)), limit }));
        });
        return statements;
      };
      expect(await count(1)).toBe(await count(50));
    });

  it('refuses what it does not know', async () => {
    for (const query of ['colour=red', 'limit=51', 'yearFrom=x']) {
      expect((await visitor.get(`/api/reports?${query}`)).status, query).toBe(422);
    }
  });
});

describe('suggestions', () => {
  it('come from the catalogue, never from the words of reports', async () => {
    const suggest = async (text: string) => (await visitor.get<{ items: SearchSuggestion[] }>(
      `/api/reports/suggestions?text=${text}`)).body.items;
    expect((await suggest('quill'))[0]).toMatchObject({ kind: 'coin_type',
      value: expect.stringContaining('quillhaven') });
    expect((await suggest('a')).length).toBeLessThanOrEqual(8);
    expect(await suggest('zebraw')).toEqual([]);
    expect(await suggest('')).toEqual([]);
    expect(await suggest('%25')).toEqual([]);
  });
});
