import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { readCatalogue, seedCatalogue, type CatalogueFiles } from '#database/seeds/catalogue';
import { createTestDatabase, type TestDatabase } from '#tests/support/test-database';

let database: TestDatabase;
let files: CatalogueFiles;
beforeAll(async () => {
  [database, files] = await Promise.all([createTestDatabase(), readCatalogue()]);
});
afterAll(() => database.drop());

const slug = 'us-dollar-morgan';
const revisions = () => database.owner('coin_type_revision')
  .join('coin_type', 'coin_type.id', 'coin_type_revision.coin_type_id')
  .where('coin_type.slug', slug).orderBy('coin_type_revision.revision')
  .select('coin_type_revision.revision', 'coin_type_revision.standard',
    'coin_type.current_revision');
const withNotes = (notes: string[]): CatalogueFiles => ({ ...files,
  types: files.types.map((type) => type.slug === slug
    ? { ...type, standard: { ...type.standard, notes } } : type) });

describe('seeding the catalogue', () => {
  it('changes nothing when run again', async () => {
    const counted = async () => (await database.owner.raw(
      `select (select count(*) from coin_type_revision)::int as revisions,
              (select max(xmin::text::bigint) from coin_type)::text as types,
              (select max(xmin::text::bigint) from coin_type_issue)::text as issues,
              (select max(xmin::text::bigint) from tell)::text as tells`)).rows[0];
    const before = await counted();
    expect((await seedCatalogue(database.owner)).newRevisions).toBe(0);
    expect(await counted()).toEqual(before);
    expect(before.revisions).toBe(files.types.length);
  });

  it('gives a changed standard a new revision and keeps the old one as it was', async () => {
    const [first] = await revisions();
    expect((await seedCatalogue(database.owner, withNotes(['changed']))).newRevisions).toBe(1);
    const [kept, added] = await revisions();
    expect(kept.standard).toEqual(first.standard);
    expect(added).toMatchObject({ revision: 2, current_revision: 2 });
    expect(added.standard.notes).toEqual(['changed']);
  });

  it('goes on to a third when a standard is changed back', async () => {
    expect((await seedCatalogue(database.owner)).newRevisions).toBe(1);
    expect((await revisions()).map(({ revision }) => revision)).toEqual([1, 2, 3]);
  });

  it('takes away a date and mint that the files no longer have', async () => {
    const morgan = files.types.find((type) => type.slug === slug);
    if (!morgan) throw new Error('the catalogue lost its Morgan dollar');
    const rows = () => database.owner('coin_type_issue')
      .join('coin_type', 'coin_type.id', 'coin_type_issue.coin_type_id')
      .where({ 'coin_type.slug': slug, 'coin_type_issue.mint_mark': 'CC' });
    expect(await rows()).toHaveLength(13);
    await seedCatalogue(database.owner, { ...files, types: files.types.map((type) =>
      type === morgan ? { ...type,
        issues: type.issues.filter(({ mintMark }) => mintMark !== 'CC') } : type) });
    expect(await rows()).toHaveLength(0);
    await seedCatalogue(database.owner);
    expect(await rows()).toHaveLength(13);
  });

  it('offers no word of a tell kept from the public to mend a search with', async () => {
    const words = (await database.owner('search_word').select('word'))
      .map(({ word }) => String(word));
    expect(words).toContain('morgan');
    expect(words).toContain('quillhaven');
    // Only in "Wrong die axis" (public) and "Glassy fields, rough recesses" (clubs).
    expect(words).toContain('axis');
    expect(words).not.toContain('glassy');
    for (const word of words) expect(word).toMatch(/^[\p{Ll}\p{N}]{3,}$/u);
  });
});
