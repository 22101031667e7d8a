import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { CoinTypeSummary, CoinTypeView, TaxonomyView } from '#shared/catalogue/coin-type-view';
import type { Page } from '#shared/paging';
import { addClub, addMember } from '#tests/support/factories/people';
import { fileReport, publishReport, reportContent } from '#tests/support/factories/reports';
import { startTestApp, type TestApp } from '#tests/support/test-app';
import type { TestClient } from '#tests/support/test-client';

let app: TestApp;
let visitor: TestClient;
beforeAll(async () => {
  app = await startTestApp();
  visitor = app.client();
});
afterAll(() => app.stop());

const list = async (query: string) =>
  (await visitor.get<Page<CoinTypeSummary>>(`/api/coin-types?${query}`)).body;

describe('the list of coin types', () => {
  it('gives every type once, page by page', async () => {
    const { count } = await app.store.owner('coin_type').count({ count: '*' }).first() ?? {};
    const slugs: string[] = [];
    let next: string | null = '';
    while (next !== null) {
      const page: Page<CoinTypeSummary> = await list(`limit=7${next && `&after=${next}`}`);
      slugs.push(...page.items.map(({ slug }) => slug));
      next = page.next;
    }
    expect(slugs).toHaveLength(Number(count));
    expect(new Set(slugs).size).toBe(slugs.length);
  });

  it('puts names that begin so first, and forgives a slip', async () => {
    expect((await list('text=quill')).items[0]?.slug).toMatch(/^quillhaven/);
    expect((await list('text=morgn')).items.map(({ name }) => name.toLowerCase()))
      .toContainEqual(expect.stringContaining('morgan'));
    expect((await list('text=%25')).items).toEqual([]);
    expect((await list('metal=gold')).items.every(({ metal }) => metal === 'gold')).toBe(true);
  });

  it('refuses a page that it never gave', async () => {
    expect((await visitor.get('/api/coin-types?after=xyz')).status).toBe(422);
  });
});

describe('the page of a coin type', () => {
  it('gives the standard with its sources, and counts the reports that the reader may read',
    async () => {
      const club = await addClub(app.store.owner);
      const author = await app.client().signIn((await addMember(app.store.owner, club)).email);
      for (const audience of ['public', 'clubs'] as const) {
        const number = await fileReport(author, reportContent(club, { audience }));
        await publishReport(app.store.owner, number, { audience });
      }
      const path = '/api/coin-types/quillhaven-crown';
      const { body } = await visitor.get<CoinTypeView>(path);
      expect(body.standard).toContainEqual(expect.objectContaining({ quantity: 'weight',
        nominal: 26.73, unit: 'g', source: expect.stringContaining('demonstration') }));
      expect(body.issues.length).toBeGreaterThan(0);
      expect(body.reportCount).toBe(1);
      expect((await author.get<CoinTypeView>(path)).body.reportCount).toBe(2);
    });

  it('is not there for a type that is not', async () => {
    expect((await visitor.get('/api/coin-types/no-such-type')).status).toBe(404);
  });
});

describe('the taxonomy', () => {
  it('shows a visitor the public tells, a member those of the clubs, a moderator all', async () => {
    const club = await addClub(app.store.owner);
    const disclosed = async (client: TestClient) => {
      const { body } = await client.get<TaxonomyView>('/api/tells');
      expect(body.methods.length).toBeGreaterThan(0);
      return [...new Set(body.tells.map(({ disclosure }) => disclosure))].sort();
    };
    await app.store.owner('tell').insert({ id: 'kept-close', name: 'Kept close', seen: 'so',
      place: 'any', methods: [], disclosure: 'moderators', position: 9_999 });
    const member = await addMember(app.store.owner, club);
    const moderator = await addMember(app.store.owner, club, 'moderator');
    expect(await disclosed(visitor)).toEqual(['public']);
    expect(await disclosed(await app.client().signIn(member.email))).toEqual(['clubs', 'public']);
    expect(await disclosed(await app.client().signIn(moderator.email)))
      .toEqual(['clubs', 'moderators', 'public']);
  });
});
