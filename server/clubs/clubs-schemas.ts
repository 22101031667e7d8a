import type { ClubView } from '#shared/accounts/session';
import { clubRoles } from '#shared/access/audience';
import { mailStates } from '#shared/mail/mail-ledger';
import { clubSummary, emailAddress, timeZone } from '../accounts/accounts-schemas';
import { z } from '../http/openapi-zod';

const rolesField = z.array(z.enum(clubRoles)).max(clubRoles.length);

export const clubList = z.strictObject({ items: z.array(clubSummary) });
export const clubParams = z.object({ slug: z.string().max(60) });
export const memberParams = clubParams.extend({ personId: z.uuid() });
export const invitationParams = clubParams.extend({ id: z.uuid() });

export const clubView = z.strictObject({
  slug: z.string(),
  name: z.string(),
  postalAddress: z.string(),
  timeZone: z.string(),
  mayManage: z.boolean(),
  members: z.array(z.strictObject({
    personId: z.uuid(), displayName: z.string(), email: z.string(), roles: rolesField,
    since: z.string(),
  })),
  invitations: z.array(z.strictObject({
    id: z.uuid(), email: z.string(), roles: rolesField, createdAt: z.string(),
    expiresAt: z.string(), mailState: z.enum(mailStates).nullable(),
  })),
}).openapi('Club') satisfies z.ZodType<ClubView>;

export const newClub = z.strictObject({
  name: z.string().trim().min(1).max(120),
  slug: z.string().max(60).regex(/^[a-z0-9]+(-[a-z0-9]+)*$/, { error: 'not_a_slug' }),
  postalAddress: z.string().trim().max(300),
  timeZone,
  secretaryEmail: emailAddress,
});
export const clubChange = z.strictObject({
  name: z.string().trim().min(1).max(120).optional(),
  postalAddress: z.string().trim().max(300).optional(),
  timeZone: timeZone.optional(),
});
export const invitationRequest = z.strictObject({ email: emailAddress, roles: rolesField.min(1) });
export const rolesRequest = z.strictObject({ roles: rolesField });
