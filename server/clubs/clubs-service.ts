import { randomUUID } from 'node:crypto';
import type { ClubMemberView, ClubSummary, ClubView,
  InvitationView } from '#shared/accounts/session';
import type { ClubRole } from '#shared/access/audience';
import { accountLinkHash, accountLinkToken } from '../accounts/account-link';
import { addAccountLink } from '../accounts/account-links-queries';
import { recordAudit } from '../audit/audit';
import type { Config } from '../config';
import type { Transaction } from '../db/database';
import { Conflict, InvalidInput, NotAllowed, NotFound } from '../errors';
import type { SignedIn } from '../http/route';
import { reserveMail } from '../mail/reserve-mail';
import { addMemberships, completeRoles } from './clubs-queries';

const hoursOfInvitation = 14 * 24;
const membersShown = 500;

interface ClubRow {
  readonly id: string;
  readonly slug: string;
  readonly name: string;
  readonly postal_address: string;
  readonly time_zone: string;
  readonly may_manage: boolean;
}

export type ClubsService = ReturnType<typeof createClubsService>;

export function createClubsService(config: Config) {
  return {
    list: (trx: Transaction): Promise<ClubSummary[]> => trx('club').select('slug', 'name')
      .whereNull('closed_at').orderBy('name').limit(1000),

    view: async (trx: Transaction, slug: string): Promise<ClubView> =>
      toView(trx, await getClub(trx, slug)),

    async add(trx: Transaction, actor: SignedIn, club: {
      name: string; slug: string; postalAddress: string; timeZone: string; secretaryEmail: string;
    }): Promise<ClubView> {
      const [row] = await trx('club').insert({
        slug: club.slug, name: club.name, postal_address: club.postalAddress,
        time_zone: club.timeZone,
      }).onConflict('slug').ignore().returning('id');
      if (!row) throw new InvalidInput([{ field: 'slug', code: 'taken' }]);
      await recordAudit(trx, { act: 'club_added', actorId: actor.id, clubId: row.id,
        subjectKind: 'club', subjectId: row.id });
      await invite(trx, actor.id, row.id, club.secretaryEmail, ['secretary']);
      return toView(trx, await getClub(trx, club.slug));
    },

    async change(trx: Transaction, actor: SignedIn, slug: string, change: {
      name?: string | undefined; postalAddress?: string | undefined; timeZone?: string | undefined;
    }): Promise<ClubView> {
      const club = await getManagedClub(trx, slug);
      await trx('club').where({ id: club.id }).update({
        name: change.name ?? club.name,
        postal_address: change.postalAddress ?? club.postal_address,
        time_zone: change.timeZone ?? club.time_zone,
      });
      await recordAudit(trx, { act: 'club_changed', actorId: actor.id, clubId: club.id,
        subjectKind: 'club', subjectId: club.id });
      return toView(trx, await getClub(trx, slug));
    },

    async invite(
      trx: Transaction, actor: SignedIn, slug: string, email: string, roles: readonly ClubRole[],
    ): Promise<ClubView> {
      const club = await getManagedClub(trx, slug);
      await invite(trx, actor.id, club.id, email, roles);
      return toView(trx, await getClub(trx, slug));
    },

    async withdrawInvitation(
      trx: Transaction, actor: SignedIn, slug: string, id: string,
    ): Promise<void> {
      const club = await getManagedClub(trx, slug);
      const withdrawn = await trx('account_link')
        .where({ id, club_id: club.id, kind: 'invitation' }).whereNull('used_at')
        .update({ withdrawn_at: trx.fn.now() });
      if (!withdrawn) throw new NotFound();
      await recordAudit(trx, { act: 'invitation_withdrawn', actorId: actor.id, clubId: club.id,
        subjectKind: 'invitation', subjectId: id });
    },

    /** Sets the roles a person holds in the club; the last secretary can't be taken away. */
    async setRoles(
      trx: Transaction, actor: SignedIn, slug: string, personId: string,
      wanted: readonly ClubRole[],
    ): Promise<ClubView> {
      const club = await getManagedClub(trx, slug);
      // One at a time in a club, so that two secretaries can't take each other away at once.
      await trx.raw(`select pg_advisory_xact_lock(hashtext(?))`, [`roles ${club.id}`]);
      const held: { role: ClubRole }[] = await trx('membership').select('role')
        .where({ club_id: club.id, person_id: personId }).whereRaw('during @> now()');
      if (!held.length) throw new NotFound();
      const roles = completeRoles(wanted);
      const removed = held.map(({ role }) => role).filter((role) => !roles.includes(role));
      if (removed.includes('secretary') && await countSecretaries(trx, club.id) <= 1) {
        throw new Conflict('last_secretary');
      }
      await trx('membership').where({ club_id: club.id, person_id: personId })
        .whereIn('role', removed).whereRaw('during @> now()')
        .update({ during: trx.raw(`tstzrange(lower(during),
          greatest(now(), lower(during) + interval '1 microsecond'))`) });
      await addMemberships(trx, { personId, clubId: club.id, roles, grantedBy: actor.id });
      await recordAudit(trx, { act: 'roles_set', actorId: actor.id, clubId: club.id,
        subjectKind: 'person', subjectId: personId,
        details: { before: held.map(({ role }) => role), after: roles } });
      return toView(trx, await getClub(trx, slug));
    },
  };

  async function invite(
    trx: Transaction, actorId: string, clubId: string, email: string, roles: readonly ClubRole[],
  ): Promise<void> {
    const id = randomUUID();
    await trx('account_link').where({ club_id: clubId, email, kind: 'invitation' })
      .whereNull('used_at').whereNull('withdrawn_at').update({ withdrawn_at: trx.fn.now() });
    await addAccountLink(trx, {
      id, kind: 'invitation', tokenHash: accountLinkHash(accountLinkToken(id, config.mailTokenKey)),
      email, clubId, roles: completeRoles(roles), invitedBy: actorId,
      hoursValid: hoursOfInvitation,
    });
    await reserveMail(trx, {
      cause: `invitation:${id}`, kind: 'invitation', personId: null, address: email,
      parameters: { linkId: id, clubId, roles: completeRoles(roles) },
    });
    await recordAudit(trx, { act: 'invitation_sent', actorId, clubId,
      subjectKind: 'invitation', subjectId: id, details: { roles } });
  }
}

async function getClub(trx: Transaction, slug: string): Promise<ClubRow> {
  const row: ClubRow | undefined = await trx('club')
    .select('club.id', 'slug', 'name', 'postal_address', 'time_zone',
      trx.raw(`(club.id = any (actor_clubs_as('secretary')) or actor_is_registrar())
        as may_manage`))
    .where({ slug }).whereNull('closed_at').first();
  if (!row) throw new NotFound();
  return row;
}

async function getManagedClub(trx: Transaction, slug: string): Promise<ClubRow> {
  const club = await getClub(trx, slug);
  if (!club.may_manage) throw new NotAllowed();
  return club;
}

async function countSecretaries(trx: Transaction, clubId: string): Promise<number> {
  const row = await trx('membership').count({ count: '*' })
    .where({ club_id: clubId, role: 'secretary' }).whereRaw('during @> now()').first();
  return Number(row?.['count'] ?? 0);
}

async function toView(trx: Transaction, club: ClubRow): Promise<ClubView> {
  const members: ClubMemberView[] = club.may_manage ? await trx('membership')
    .join('person', 'person.id', 'membership.person_id')
    .select({ personId: 'person.id', displayName: 'person.display_name', email: 'person.email' },
      trx.raw('array_agg(membership.role order by membership.role) as roles'),
      trx.raw(`to_json(min(lower(membership.during)) at time zone 'UTC') #>> '{}' || 'Z'
        as since`))
    .where({ club_id: club.id }).whereRaw('membership.during @> now()')
    .groupBy('person.id').orderBy('person.display_name').limit(membersShown) : [];
  const invitations: InvitationView[] = club.may_manage ? (await trx('account_link')
    .leftJoin('mail', 'mail.cause', trx.raw(`'invitation:' || account_link.id`))
    .select('account_link.id', 'account_link.email', 'roles', 'account_link.created_at',
      'expires_at', 'mail.state')
    .where({ club_id: club.id, 'account_link.kind': 'invitation' }).whereNull('used_at')
    .whereNull('withdrawn_at').where('expires_at', '>', trx.fn.now())
    .orderBy('account_link.created_at', 'desc').limit(membersShown)).map((row) => ({
    id: row.id, email: row.email, roles: row.roles, createdAt: row.created_at.toISOString(),
    expiresAt: row.expires_at.toISOString(), mailState: row.state,
  })) : [];
  return {
    slug: club.slug, name: club.name, postalAddress: club.postal_address,
    timeZone: club.time_zone, mayManage: club.may_manage, members, invitations,
  };
}
