import { randomUUID } from 'node:crypto';
import bcrypt from 'bcrypt';
import type { Knex } from 'knex';
import type { ClubRole } from '#shared/access/audience';
import { testPassword } from '../test-client';

const passwordHash = bcrypt.hash(testPassword, 4);

export interface TestClub {
  readonly id: string;
  readonly slug: string;
}

export interface TestPerson {
  readonly id: string;
  readonly email: string;
}

export async function addClub(owner: Knex, slug = `club-${randomUUID()}`): Promise<TestClub> {
  const [row] = await owner('club').insert({ slug, name: `Coin circle ${slug}` })
    .returning(['id', 'slug']);
  return row;
}

/** A person who holds the roles in the club; without a club, a subscriber of none. */
export async function addPerson(owner: Knex, person: {
  readonly club?: TestClub; readonly roles?: readonly ClubRole[]; readonly isRegistrar?: boolean;
  readonly name?: string; readonly timeZone?: string;
} = {}): Promise<TestPerson> {
  const id = randomUUID();
  const [row] = await owner('person').insert({
    id, email: `${id}@example.org`, display_name: person.name ?? `Person ${id.slice(0, 8)}`,
    password_hash: await passwordHash, is_registrar: person.isRegistrar ?? false,
    time_zone: person.timeZone ?? 'UTC',
  }).returning(['id', 'email']);
  for (const role of person.roles ?? []) {
    await owner('membership').insert({ person_id: id, club_id: person.club?.id ?? null, role });
  }
  return row;
}

/** A member, which every moderator and secretary is as well. */
export function addMember(
  owner: Knex, club: TestClub, ...more: readonly ClubRole[]
): Promise<TestPerson> {
  return addPerson(owner, { club, roles: ['member', ...more] });
}
