import type { SignedInPerson } from '#shared/accounts/session';
import type { ClubRole } from '#shared/access/audience';
import type { Transaction } from '../db/database';

export interface PersonRow {
  readonly id: string;
  readonly email: string;
  readonly password_hash: string | null;
  readonly session_epoch: number;
}

export interface AccountLinkRow {
  readonly id: string;
  readonly kind: 'reset' | 'invitation' | 'registration' | 'first_registrar';
  readonly email: string | null;
  readonly person_id: string | null;
  readonly club_id: string | null;
  readonly roles: readonly ClubRole[];
  readonly invited_by: string | null;
  readonly display_name: string | null;
}

const personColumns = ['id', 'email', 'password_hash', 'session_epoch'] as const;

export function findPersonByEmail(trx: Transaction, email: string): Promise<PersonRow | undefined> {
  return trx('person').select(...personColumns).where({ email }).whereNull('closed_at').first();
}

export function findPerson(trx: Transaction, id: string): Promise<PersonRow | undefined> {
  return trx('person').select(...personColumns).where({ id }).whereNull('closed_at').first();
}

/** The person as their own browser knows them, memberships grouped by club, in one statement. */
export async function findSignedInPerson(
  trx: Transaction, id: string,
): Promise<SignedInPerson | undefined> {
  const row = await trx('person').select('person.id', 'person.email', 'person.display_name',
    'person.time_zone', 'person.is_registrar',
    trx.raw(`(select count(*) from notice n
       where n.person_id = person.id and n.read_at is null) as unread`),
    trx.raw(`(select coalesce(json_agg(json_build_object('club', g.club, 'roles', g.roles)
         order by g.name nulls last), '[]')
       from (select c.name, case when c.id is null then null
               else json_build_object('slug', c.slug, 'name', c.name) end as club,
               json_agg(m.role order by m.role) as roles
             from membership m left join club c on c.id = m.club_id
            where m.person_id = person.id and m.during @> now() and c.closed_at is null
            group by c.id) g) as memberships`))
    .where({ 'person.id': id }).whereNull('person.closed_at').first();
  return row && {
    id: row.id, email: row.email, displayName: row.display_name, timeZone: row.time_zone,
    isRegistrar: row.is_registrar, memberships: row.memberships, unreadNotices: row.unread,
  };
}

export async function addPerson(trx: Transaction, person: {
  readonly email: string; readonly displayName: string; readonly passwordHash: string;
  readonly timeZone: string; readonly isRegistrar: boolean;
}): Promise<PersonRow> {
  const [row] = await trx('person').insert({
    email: person.email, display_name: person.displayName, password_hash: person.passwordHash,
    time_zone: person.timeZone, is_registrar: person.isRegistrar,
  }).returning([...personColumns]);
  return row;
}

/** A new password ends every session: whoever knew the old one is out. */
export async function setPassword(
  trx: Transaction, id: string, passwordHash: string,
): Promise<PersonRow> {
  const [row] = await trx('person').where({ id })
    .update({ password_hash: passwordHash, session_epoch: trx.raw('session_epoch + 1') })
    .returning([...personColumns]);
  await endSessions(trx, id);
  return row;
}

export async function raiseSessionEpoch(trx: Transaction, id: string): Promise<void> {
  await trx('person').where({ id }).update({ session_epoch: trx.raw('session_epoch + 1') });
  await endSessions(trx, id);
}

async function endSessions(trx: Transaction, id: string): Promise<void> {
  await trx('session').where({ person_id: id }).delete();
}

export async function addAccountLink(trx: Transaction, link: {
  readonly id: string; readonly kind: AccountLinkRow['kind']; readonly tokenHash: Buffer;
  readonly email?: string; readonly personId?: string; readonly clubId?: string;
  readonly roles?: readonly ClubRole[]; readonly invitedBy?: string;
  readonly displayName?: string; readonly hoursValid: number;
}): Promise<void> {
  await trx('account_link').insert({
    id: link.id, kind: link.kind, token_hash: link.tokenHash, email: link.email ?? null,
    person_id: link.personId ?? null, club_id: link.clubId ?? null, roles: link.roles ?? [],
    invited_by: link.invitedBy ?? null, display_name: link.displayName ?? null,
    expires_at: trx.raw(`now() + ? * interval '1 hour'`, [link.hoursValid]),
  });
}

/** The link while it is good; with `use`, marked used in the same statement, once for ever. */
export async function findAccountLink(
  trx: Transaction, tokenHash: Buffer, use: boolean,
): Promise<AccountLinkRow | undefined> {
  const columns = ['id', 'kind', 'email', 'person_id', 'club_id', 'roles', 'invited_by',
    'display_name'];
  const good = trx('account_link').where({ token_hash: tokenHash }).whereNull('used_at')
    .whereNull('withdrawn_at').where('expires_at', '>', trx.fn.now());
  if (!use) return good.select(columns).first();
  const [row] = await good.update({ used_at: trx.fn.now() }).returning(columns);
  return row;
}

/** Links asked for by this address in the last hour, so that nobody's mailbox is flooded. */
export async function countRecentLinks(trx: Transaction, email: string): Promise<number> {
  const row = await trx('account_link').count({ count: '*' }).where({ email })
    .where('created_at', '>', trx.raw(`now() - interval '1 hour'`)).first();
  return Number(row?.['count'] ?? 0);
}

export async function hasRegistrar(trx: Transaction): Promise<boolean> {
  return (await trx('person').select('id').where({ is_registrar: true })
    .whereNull('closed_at').first()) !== undefined;
}
