import type { AccountLinkUse, AccountLinkView, SessionView,
  SignInRequest } from '#shared/accounts/session';
import { clubRoles } from '#shared/access/audience';
import { passwordProblem } from '#shared/access/password-rules';
import { z } from '../http/openapi-zod';

export const emailAddress = z.string().trim().max(254).regex(/^[^@\s]+@[^@\s]+\.[^@\s]+$/,
  { error: 'not_an_address' }).transform((address) => address.toLowerCase());
export const displayName = z.string().trim().min(1).max(120);
export const timeZone = z.string().max(60).refine(isTimeZone, { error: 'not_a_time_zone' });
export const newPassword = z.string().superRefine((password, context) => {
  const problem = passwordProblem(password);
  if (problem) context.addIssue({ code: 'custom', message: problem });
});

function isTimeZone(name: string): boolean {
  try {
    new Intl.DateTimeFormat('en', { timeZone: name });
    return true;
  } catch {
    return false;
  }
}

export const signInRequest = z.strictObject({
  email: z.string().max(254), password: z.string().max(1000),
}) satisfies z.ZodType<SignInRequest>;

export const clubSummary = z.strictObject({ slug: z.string(), name: z.string() });

export const sessionView = z.strictObject({
  person: z.strictObject({
    id: z.uuid(),
    email: z.string(),
    displayName: z.string(),
    timeZone: z.string(),
    isRegistrar: z.boolean(),
    memberships: z.array(z.strictObject({
      club: clubSummary.nullable(), roles: z.array(z.enum(clubRoles)),
    })),
    unreadNotices: z.int(),
  }).nullable(),
}).openapi('Session') satisfies z.ZodType<SessionView>;

export const registrationRequest = z.strictObject({ email: emailAddress, displayName });
export const resetRequest = z.strictObject({ email: emailAddress });
export const tokenParams = z.object({ token: z.string().min(1).max(200) });

export const accountLinkView = z.strictObject({
  kind: z.enum(['reset', 'invitation', 'registration', 'first_registrar']),
  email: z.string().nullable(),
  club: clubSummary.nullable(),
  roles: z.array(z.enum(clubRoles)),
  needsPassword: z.boolean(),
}).openapi('AccountLink') satisfies z.ZodType<AccountLinkView>;

export const accountLinkUse = z.strictObject({
  email: emailAddress.optional(),
  displayName: displayName.optional(),
  password: newPassword.optional(),
  timeZone: timeZone.optional(),
}) satisfies z.ZodType<AccountLinkUse>;

export const accountChange = z.strictObject({
  displayName: displayName.optional(), timeZone: timeZone.optional(),
});
export const passwordChange = z.strictObject({
  current: z.string().max(1000), password: newPassword,
});
