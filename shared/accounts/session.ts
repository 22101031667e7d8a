import type { ClubRole } from '../access/audience';

export interface ClubSummary {
  readonly slug: string;
  readonly name: string;
}

export interface MembershipView {
  readonly club: ClubSummary | null;
  readonly roles: readonly ClubRole[];
}

/** What the browser knows of the person signed in. */
export interface SignedInPerson {
  readonly id: string;
  readonly email: string;
  readonly displayName: string;
  readonly timeZone: string;
  readonly isRegistrar: boolean;
  readonly memberships: readonly MembershipView[];
  readonly unreadNotices: number;
}

/** `GET /api/session`; sets the XSRF-TOKEN cookie as well. */
export interface SessionView {
  readonly person: SignedInPerson | null;
}

export interface SignInRequest {
  readonly email: string;
  readonly password: string;
}

export type AccountLinkKind = 'reset' | 'invitation' | 'registration' | 'first_registrar';

/** `GET /api/account-links/:token`: what the link is for, before it is used. */
export interface AccountLinkView {
  readonly kind: AccountLinkKind;
  readonly email: string | null;
  readonly club: ClubSummary | null;
  readonly roles: readonly ClubRole[];
  /** False where the address has an account already and only the invitation is to be accepted. */
  readonly needsPassword: boolean;
}

/** `POST /api/account-links/:token`: uses it up and signs in. */
export interface AccountLinkUse {
  readonly email?: string;
  readonly displayName?: string;
  readonly password?: string;
  readonly timeZone?: string;
}

export interface ClubMemberView {
  readonly personId: string;
  readonly displayName: string;
  readonly email: string;
  readonly roles: readonly ClubRole[];
  readonly since: string;
}

export interface InvitationView {
  readonly id: string;
  readonly email: string;
  readonly roles: readonly ClubRole[];
  readonly createdAt: string;
  readonly expiresAt: string;
  /** State of the invitation's mail in the ledger, so that none fails silently. */
  readonly mailState: string | null;
}

export interface ClubView extends ClubSummary {
  readonly postalAddress: string;
  readonly timeZone: string;
  /** The lists are empty unless the reader is secretary of the club or registrar. */
  readonly members: readonly ClubMemberView[];
  readonly invitations: readonly InvitationView[];
  readonly mayManage: boolean;
}

export interface NoticeView {
  readonly id: string;
  readonly kind: string;
  readonly report: { readonly number: string; readonly title: string } | null;
  readonly parameters: Readonly<Record<string, string | number>>;
  readonly createdAt: string;
  readonly readAt: string | null;
}
