/** Who a report is for, from the narrowest to the widest. */
export const audiences = ['club', 'named_clubs', 'clubs', 'public'] as const;
export type Audience = (typeof audiences)[number];

/** Who a single tell or pin is for. */
export const disclosures = ['public', 'clubs', 'moderators'] as const;
export type Disclosure = (typeof disclosures)[number];

export const clubRoles = ['subscriber', 'member', 'moderator', 'secretary'] as const;
export type ClubRole = (typeof clubRoles)[number];

/** Roles as a route names them: a club role held in any club, or the registrar's. */
export const roles = [...clubRoles, 'registrar'] as const;
export type Role = (typeof roles)[number];

/** True where `wider` reaches more readers than `narrower`. */
export function isWider(wider: Audience, narrower: Audience): boolean {
  return audiences.indexOf(wider) > audiences.indexOf(narrower);
}
