import type { ClubRole } from '#shared/access/audience';
import type { Transaction } from '../db/database';

/** Adds the roles that the person does not hold yet; safe to repeat. */
export async function addMemberships(trx: Transaction, grant: {
  readonly personId: string; readonly clubId: string; readonly roles: readonly ClubRole[];
  readonly grantedBy: string | null;
}): Promise<void> {
  await trx.raw(
    `insert into membership (person_id, club_id, role, granted_by)
     select ?, ?, wanted.role, ? from unnest(?::text[]) as wanted (role)
      where not exists (select from membership m where m.person_id = ? and m.club_id = ?
        and m.role = wanted.role and m.during @> now())`,
    [grant.personId, grant.clubId, grant.grantedBy, completeRoles(grant.roles),
      grant.personId, grant.clubId]);
}

/** Moderator and secretary are grants to a member, so they bring the member's role along. */
export function completeRoles(roles: readonly ClubRole[]): ClubRole[] {
  const needsMember = roles.includes('moderator') || roles.includes('secretary');
  return [...new Set<ClubRole>(needsMember ? ['member', ...roles] : roles)];
}
