import { randomUUID } from 'node:crypto';
import type { AccountLinkUse, AccountLinkView, SessionView } from '#shared/accounts/session';
import { recordAudit } from '../audit/audit';
import type { Config } from '../config';
import { addMemberships } from '../clubs/clubs-queries';
import type { Transaction } from '../db/database';
import { Conflict, InvalidInput, NotFound, ProblemError } from '../errors';
import { reserveMail } from '../mail/reserve-mail';
import { accountLinkHash, accountLinkToken } from './account-link';
import * as repository from './accounts-repository';
import type { PersonRow } from './accounts-repository';
import type { Passwords } from './passwords';

const hoursOfLink = { reset: 2, registration: 48 } as const;
const linksAnHour = 5;

/** Who is signed in after the call: what the session is given. */
export interface SignedInAs {
  readonly personId: string;
  readonly epoch: number;
}

export type AccountsService = ReturnType<typeof createAccountsService>;

/**
 * Accounts. Functions that take `asSystem` run as the system, since they look past the caller: the
 * caller is not signed in yet.
 */
export function createAccountsService(config: Config, passwords: Passwords) {
  return {
    /** 401 `wrong_credentials` for an unknown address and a wrong password alike. */
    async signIn(person: PersonRow | undefined, password: string): Promise<SignedInAs> {
      if (!await passwords.matches(password, person?.password_hash) || !person) {
        throw new ProblemError(401, 'wrong_credentials');
      }
      return { personId: person.id, epoch: person.session_epoch };
    },

    async view(trx: Transaction, personId: string | undefined): Promise<SessionView> {
      if (!personId) return { person: null };
      return { person: await repository.findSignedInPerson(trx, personId) ?? null };
    },

    /** Mails a link: to set a password where the address is new, else to reset it. */
    async requestLink(
      asSystem: Transaction, kind: 'reset' | 'registration', email: string, displayName?: string,
    ): Promise<void> {
      const person = await repository.findPersonByEmail(asSystem, email);
      if (kind === 'reset' && !person) return;
      if (await repository.countRecentLinks(asSystem, email) >= linksAnHour) return;
      const effective = person ? 'reset' : 'registration';
      const id = randomUUID();
      await repository.addAccountLink(asSystem, {
        id, kind: effective, tokenHash: hashOf(id), email, hoursValid: hoursOfLink[effective],
        ...(person ? { personId: person.id } : {}), ...(displayName ? { displayName } : {}),
      });
      await reserveMail(asSystem, {
        cause: `${effective}:${id}`, kind: effective, personId: person?.id ?? null,
        address: email, parameters: { linkId: id, hoursValid: hoursOfLink[effective] },
      });
    },

    async viewLink(asSystem: Transaction, token: string): Promise<AccountLinkView> {
      const link = await repository.findAccountLink(asSystem, accountLinkHash(token), false);
      if (!link) throw new ProblemError(404, 'link_used_or_expired');
      const club = link.club_id ? await asSystem('club').select('slug', 'name')
        .where({ id: link.club_id }).first() : undefined;
      const known = link.email ? await repository.findPersonByEmail(asSystem, link.email)
        : undefined;
      return {
        kind: link.kind, email: link.email, club: club ?? null, roles: link.roles,
        needsPassword: link.kind !== 'invitation' || known === undefined,
      };
    },

    /**
     * Uses a link up. Signs nobody in where an invitation was accepted for an account that is
     * there already: its password is asked for as ever.
     */
    async useLink(
      asSystem: Transaction, token: string, use: AccountLinkUse,
    ): Promise<SignedInAs | undefined> {
      const passwordHash = use.password ? await passwords.hash(use.password) : undefined;
      const link = await repository.findAccountLink(asSystem, accountLinkHash(token), true);
      if (!link) throw new ProblemError(404, 'link_used_or_expired');
      const email = link.email ?? use.email;
      if (!email) throw new InvalidInput([{ field: 'email', code: 'required' }]);
      const known = await repository.findPersonByEmail(asSystem, email);
      if (link.kind === 'first_registrar') {
        if (await repository.hasRegistrar(asSystem)) {
          throw new ProblemError(404, 'link_used_or_expired');
        }
        if (known) throw new Conflict('address_known');
      }
      if (known && link.kind === 'invitation') {
        await acceptInvitation(asSystem, link, known.id);
        return undefined;
      }
      if (!passwordHash) throw new InvalidInput([{ field: 'password', code: 'required' }]);
      if (known) {
        const changed = await repository.setPassword(asSystem, known.id, passwordHash);
        await recordAudit(asSystem, { act: 'password_reset', actorId: known.id,
          subjectKind: 'person', subjectId: known.id });
        return { personId: changed.id, epoch: changed.session_epoch };
      }
      const displayName = use.displayName ?? link.display_name;
      if (!displayName) throw new InvalidInput([{ field: 'displayName', code: 'required' }]);
      const added = await repository.addPerson(asSystem, {
        email, displayName, passwordHash, timeZone: use.timeZone ?? 'UTC',
        isRegistrar: link.kind === 'first_registrar',
      });
      await recordAudit(asSystem, { act: 'person_added', actorId: added.id,
        subjectKind: 'person', subjectId: added.id, details: { by: link.kind } });
      if (link.kind === 'invitation') await acceptInvitation(asSystem, link, added.id);
      return { personId: added.id, epoch: added.session_epoch };
    },

    async change(
      trx: Transaction, personId: string, change: { displayName?: string; timeZone?: string },
    ): Promise<void> {
      const changes = {
        ...(change.displayName ? { display_name: change.displayName } : {}),
        ...(change.timeZone ? { time_zone: change.timeZone } : {}),
      };
      if (Object.keys(changes).length) await trx('person').where({ id: personId }).update(changes);
    },

    async changePassword(
      trx: Transaction, personId: string, current: string, password: string,
    ): Promise<SignedInAs> {
      const person = await repository.findPerson(trx, personId);
      if (!person) throw new NotFound();
      if (!await passwords.matches(current, person.password_hash)) {
        throw new InvalidInput([{ field: 'current', code: 'wrong_password' }]);
      }
      const changed = await repository.setPassword(trx, personId, await passwords.hash(password));
      await recordAudit(trx, { act: 'password_changed', actorId: personId,
        subjectKind: 'person', subjectId: personId });
      return { personId, epoch: changed.session_epoch };
    },

    signOutEverywhere: (trx: Transaction, personId: string): Promise<void> =>
      repository.raiseSessionEpoch(trx, personId),
  };

  function hashOf(linkId: string): Buffer {
    return accountLinkHash(accountLinkToken(linkId, config.mailTokenKey));
  }
}

async function acceptInvitation(
  trx: Transaction, link: repository.AccountLinkRow, personId: string,
): Promise<void> {
  if (!link.club_id) return;
  await addMemberships(trx, {
    personId, clubId: link.club_id, roles: link.roles, grantedBy: link.invited_by,
  });
  await recordAudit(trx, { act: 'invitation_accepted', actorId: personId, clubId: link.club_id,
    subjectKind: 'person', subjectId: personId, details: { roles: link.roles } });
}
