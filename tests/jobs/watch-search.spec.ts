import fc from 'fast-check';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { filterToQuery, type WatchFilter } from '#shared/watches/watch-filter';
import type { ReportContent } from '#shared/reports/report-content';
import type { ReportSearchAnswer } from '#shared/reports/report-view';
import { addClub, addMember, addPerson, type TestClub,
  type TestPerson } from '#tests/support/factories/people';
import { fileReport, publishReport, reportContent } from '#tests/support/factories/reports';
import { MailRoom } from '#tests/support/mail-room';
import { startTestApp, type TestApp } from '#tests/support/test-app';
import type { TestClient } from '#tests/support/test-client';

let app: TestApp;
let room: MailRoom;
let club: TestClub;
let tells: readonly string[];
const numbers: string[] = [];
const readers: { readonly who: string; person: TestPerson; client: TestClient }[] = [];

const seed = Number(process.env['TEST_SEED'] ?? Math.floor(Math.random() * 2 ** 31));

/** Reports of every audience and of many values, and a reader of each sight. */
beforeAll(async () => {
  process.stdout.write(`watch and search: seed ${seed} (TEST_SEED)\n`);
  app = await startTestApp();
  room = await MailRoom.open(app);
  club = await addClub(app.store.owner);
  const author = await app.client().signIn((await addMember(app.store.owner, club)).email);
  const rows = await app.store.owner('tell').select('id').orderBy(['disclosure', 'id'])
    .whereIn('id', app.store.owner('tell').select('id').where({ disclosure: 'clubs' }).limit(1))
    .orWhereIn('id', app.store.owner('tell').select('id').where({ disclosure: 'public' }).limit(2));
  tells = rows.map(({ id }) => id);
  const pieces: ReportContent['presentedAs'][] = [
    reportContent(club).presentedAs,
    { coinType: null, kind: 'coin', metal: 'gold', description: 'Harbour ducat', year: 1795,
      mintMark: 'H' },
    { coinType: null, kind: 'token', metal: 'brass', description: 'Ferry token Brückenzoll',
      year: null, mintMark: '' },
  ];
  const places = [['flea_market', 'GB'], ['auction', 'DE'], ['coin_show', 'NO']] as const;
  const accounts = ['<p>In a box of zebrawood.</p>', '<p>Among other crowns.</p>'];
  for (let index = 0; index < 12; index++) {
    const [channel, country] = places[index % 3] ?? places[0];
    const audience = (['public', 'public', 'clubs', 'club'] as const)[index % 4] ?? 'public';
    const content = reportContent(club);
    const number = await fileReport(author, { ...content, audience,
      presentedAs: pieces[Math.floor(index / 4)] ?? content.presentedAs,
      surfacing: { ...content.surfacing, channel, country },
      account: accounts[index % 2] ?? '',
      tells: tells.filter((_id, place) => (index >> place) % 2 === 0).map((tellId) =>
        ({ tellId, note: '', disclosure: 'public', pins: [] })) });
    await publishReport(app.store.owner, number, { audience,
      confidence: index % 5 === 0 ? 'suspected' : 'probable' });
    numbers.push(number);
  }
  const add = async (who: string, person: TestPerson): Promise<void> => {
    readers.push({ who, person, client: await app.client().signIn(person.email) });
  };
  await add('a subscriber', await addPerson(app.store.owner, { roles: ['subscriber'] }));
  await add('a fellow', await addMember(app.store.owner, club));
  await add('a member elsewhere', await addMember(app.store.owner, await addClub(app.store.owner)));
  await add('the registrar', await addPerson(app.store.owner, { isRegistrar: true }));
});
afterAll(async () => {
  await room.close();
  await app.stop();
});

const words = ['harbour', 'duc', 'ducat', 'ferry', 'bruckenzoll', 'zebrawood', 'quillhaven', '1891',
  '-ducat', '"ferry token"', 'or', '!!', 'harbour!', ':*', 'brass ', 'gold', 'crown'];

const filters = (): fc.Arbitrary<WatchFilter> => {
  const some = (values: readonly string[]) => fc.uniqueArray(fc.constantFrom(...values),
    { minLength: 1, maxLength: 3 });
  return fc.record({
    text: fc.array(fc.constantFrom(...words), { minLength: 1, maxLength: 3 })
      .map((chosen) => chosen.join(' ').trim()),
    coinType: some(['quillhaven-crown', 'no-such-type']),
    metal: some(['gold', 'silver', 'brass']),
    kind: some(['coin', 'token']),
    tell: some(tells),
    channel: some(['flea_market', 'auction', 'coin_show']),
    country: some(['GB', 'DE', 'NO', 'FR']),
    confidence: some(['probable', 'suspected']),
    yearFrom: fc.integer({ min: 1790, max: 1895 }),
    yearTo: fc.integer({ min: 1790, max: 1895 }),
  }, { requiredKeys: [] }).map(thin);
};

/** Most filters of ten parts find nothing: keeps of them what its own length says. */
function thin(filter: WatchFilter): WatchFilter {
  const parts = Object.entries(filter);
  const kept = parts.length <= 2 ? parts
    : parts.filter((_part, place) => (place + parts.length) % 3 === 0);
  return Object.fromEntries(kept);
}

function addressOf(filter: WatchFilter): string {
  const query = new URLSearchParams({ exact: '1', limit: '50' });
  for (const [name, values] of Object.entries(filterToQuery(filter))) {
    for (const value of [values].flat()) query.append(name, value);
  }
  return `/api/reports?${query}`;
}

describe('a saved search', () => {
  it('is told of exactly what its owner\'s search finds', async () => {
    let matched = 0;
    let empty = 0;
    await fc.assert(fc.asyncProperty(filters(), async (filter) => {
      await app.store.owner('alert').delete();
      await app.store.owner('watch').delete();
      for (const { person } of readers) await room.addWatch(person, filter);
      for (const number of numbers) await room.match(number);
      for (const { who, person, client } of readers) {
        const answer = await client.get<ReportSearchAnswer>(addressOf(filter));
        expect(answer.status, answer.text).toBe(200);
        const alerted = await app.store.owner('alert').join('report', 'report.id', 'report_id')
          .where({ person_id: person.id }).pluck('report.number');
        const found = answer.body.items.map(({ number }) => number);
        expect(alerted.toSorted(), who).toEqual(found.toSorted());
        if (found.length) matched++;
        else empty++;
      }
    }), { seed, numRuns: 100, interruptAfterTimeLimit: 50_000 });
    // Neither side of the comparison is always empty.
    expect(matched).toBeGreaterThan(20);
    expect(empty).toBeGreaterThan(20);
  }, 120_000);
});
