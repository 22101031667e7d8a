import type { Knex } from 'knex';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { addClub, addMember, type TestClub,
  type TestPerson } from '#tests/support/factories/people';
import { createTestDatabase, type TestDatabase } from '#tests/support/test-database';

let store: TestDatabase;
let club: TestClub;
let other: TestClub;
let member: TestPerson;
beforeAll(async () => {
  store = await createTestDatabase();
  club = await addClub(store.owner);
  other = await addClub(store.owner);
  member = await addMember(store.owner, club);
});
afterAll(() => store.drop());

/** The clubs of the actor, and those moderated. */
async function clubsOf(trx: Knex): Promise<{ clubs: string[]; moderated: string[] }> {
  const { rows: [row] } = await trx.raw(
    `select actor_clubs()::text[] as clubs, actor_clubs_as('moderator')::text[] as moderated`);
  return row;
}

/** Acts as someone in a transaction that leaves nothing behind. */
async function during(actor: string, work: (trx: Knex) => Promise<void>): Promise<void> {
  const trx = await store.owner.transaction();
  try {
    await trx.raw('select become_actor(?)', [actor]);
    await work(trx);
  } finally {
    await trx.rollback();
  }
}

describe('the rights of the actor', () => {
  it('are those of the memberships that run', () => during(member.id, async (trx) => {
    expect(await clubsOf(trx)).toEqual({ clubs: [club.id], moderated: [] });
  }));

  it.each(['', 'system'])('are none for %j', (actor) => during(actor, async (trx) => {
    expect(await clubsOf(trx)).toEqual({ clubs: [], moderated: [] });
  }));

  it('follow a membership that the same transaction begins or ends', () =>
    during(member.id, async (trx) => {
      await trx('membership').insert({ person_id: member.id, club_id: other.id,
        role: 'moderator' });
      expect(await clubsOf(trx)).toEqual({ clubs: [club.id, other.id].sort(),
        moderated: [other.id] });
      await trx('membership').where({ person_id: member.id, club_id: club.id }).delete();
      expect((await clubsOf(trx)).clubs).toEqual([other.id]);
    }));

  it('end with a club that the same transaction closes', () => during(member.id, async (trx) => {
    await trx('club').where({ id: club.id }).update({ closed_at: trx.fn.now() });
    expect((await clubsOf(trx)).clubs).toEqual([]);
  }));

  it('never pass to someone else who acts later in the transaction', async () => {
    const stranger = await addMember(store.owner, other);
    await during(member.id, async (trx) => {
      await trx.raw('select become_actor(?)', [stranger.id]);
      expect((await clubsOf(trx)).clubs).toEqual([other.id]);
      // Set past become_actor, the rights found before count for nothing.
      await trx.raw(`select set_config('touchneedle.actor', ?, true)`, [member.id]);
      expect((await clubsOf(trx)).clubs).toEqual([club.id]);
    });
  });

  it('end with the transaction', async () => {
    const trx = await store.owner.transaction();
    await trx.raw('select become_actor(?)', [member.id]);
    await trx.commit();
    expect((await clubsOf(store.owner)).clubs).toEqual([]);
  });
});
