import type { Request } from 'express';
import { rateLimit } from 'express-rate-limit';
import type { Config } from '../config';
import { system, type Database } from '../db/database';
import { ProblemError } from '../errors';
import { issueCsrfToken } from '../http/csrf';
import { accepted, noContent, ok, publicRoute, requireRole, route, signedIn,
  type Route } from '../http/route';
import { accountChange, accountLinkUse, accountLinkView, passwordChange, registrationRequest,
  resetRequest, sessionView, signInRequest, tokenParams } from './accounts-schemas';
import { findPersonByEmail } from './accounts-repository';
import type { AccountsService, SignedInAs } from './accounts-service';

/** Failed tries for one address of mail in a quarter of an hour, from wherever they come. */
const triesPerAddress = 10;

export function accountsRoutes(
  database: Database, service: AccountsService, config: Config,
): Route[] {
  const limitTriesPerAddress = rateLimit({
    windowMs: 15 * 60_000,
    limit: triesPerAddress,
    standardHeaders: false,
    legacyHeaders: false,
    skipSuccessfulRequests: true,
    keyGenerator: (request) => `address ${String(request.body?.email).toLowerCase().slice(0, 254)}`,
    handler: () => {
      throw new ProblemError(429, 'too_many_requests', { retryAfterSeconds: 15 * 60 });
    },
  });

  return [
    route({
      method: 'get', path: '/api/session', operationId: 'getSession', limit: 'read',
      summary: 'Who is signed in; gives the XSRF-TOKEN cookie', access: publicRoute,
      answers: { 200: sessionView },
      handle: async ({ actor, person, request, response }) => {
        issueCsrfToken(request, response, config);
        if (!person) return ok({ person: null });
        return ok(await database.asActor(actor, (trx) => service.view(trx, person.id)));
      },
    }),
    route({
      method: 'post', path: '/api/session', operationId: 'signIn', limit: 'credentials',
      summary: 'Sign in', access: publicRoute, before: [limitTriesPerAddress],
      body: signInRequest, answers: { 200: sessionView }, refusals: [401],
      handle: async ({ body, request, response }) => {
        const person = await database.asActor(system, (trx) => findPersonByEmail(trx, body.email));
        const as = await service.signIn(person, body.password);
        await startSession(request, as);
        issueCsrfToken(request, response, config);
        return ok(await viewAs(as));
      },
    }),
    route({
      method: 'delete', path: '/api/session', operationId: 'signOut', limit: 'write',
      summary: 'Sign out', access: publicRoute, answers: { 204: null },
      handle: async ({ request, response }) => {
        if (request.session?.personId) await endSession(request);
        issueCsrfToken(request, response, config);
        return noContent();
      },
    }),
    route({
      method: 'delete', path: '/api/sessions', operationId: 'signOutEverywhere', limit: 'write',
      summary: 'Sign out on every device', access: requireRole('subscriber'),
      answers: { 204: null },
      handle: async (call) => {
        await database.asActor(call.actor,
          (trx) => service.signOutEverywhere(trx, signedIn(call).id));
        await endSession(call.request);
        issueCsrfToken(call.request, call.response, config);
        return noContent();
      },
    }),
    route({
      method: 'post', path: '/api/registrations', operationId: 'register', limit: 'credentials',
      summary: 'Ask for an account as subscriber; a link is mailed', access: publicRoute,
      body: registrationRequest, answers: { 202: null },
      handle: async ({ body }) => {
        await database.asActor(system,
          (trx) => service.requestLink(trx, 'registration', body.email, body.displayName));
        return accepted();
      },
    }),
    route({
      method: 'post', path: '/api/password-resets', operationId: 'requestPasswordReset',
      summary: 'Ask for a link to set a new password', access: publicRoute, limit: 'credentials',
      body: resetRequest, answers: { 202: null },
      handle: async ({ body }) => {
        await database.asActor(system, (trx) => service.requestLink(trx, 'reset', body.email));
        return accepted();
      },
    }),
    route({
      method: 'get', path: '/api/account-links/:token', operationId: 'getAccountLink',
      summary: 'What a mailed link is for', access: publicRoute, limit: 'credentials',
      params: tokenParams, answers: { 200: accountLinkView }, refusals: [404],
      handle: async ({ params }) =>
        ok(await database.asActor(system, (trx) => service.viewLink(trx, params.token))),
    }),
    route({
      method: 'post', path: '/api/account-links/:token', operationId: 'useAccountLink',
      summary: 'Use a mailed link up; signs in', access: publicRoute, limit: 'credentials',
      params: tokenParams, body: accountLinkUse, answers: { 200: sessionView },
      refusals: [404, 409],
      handle: async ({ params, body, request, response }) => {
        const as = await database.asActor(system,
          (trx) => service.useLink(trx, params.token, body));
        if (as) await startSession(request, as);
        issueCsrfToken(request, response, config);
        return ok(as ? await viewAs(as) : { person: null });
      },
    }),
    route({
      method: 'patch', path: '/api/account', operationId: 'changeAccount', limit: 'write',
      summary: 'Change own name or time zone', access: requireRole('subscriber'),
      body: accountChange, answers: { 200: sessionView },
      handle: async (call) => {
        const { id } = signedIn(call);
        return ok(await database.asActor(call.actor, async (trx) => {
          await service.change(trx, id, call.body);
          return service.view(trx, id);
        }));
      },
    }),
    route({
      method: 'put', path: '/api/account/password', operationId: 'changePassword',
      summary: 'Change own password; ends every other session', limit: 'credentials',
      access: requireRole('subscriber'), body: passwordChange, answers: { 204: null },
      handle: async (call) => {
        const as = await database.asActor(call.actor, (trx) => service.changePassword(trx,
          signedIn(call).id, call.body.current, call.body.password));
        await startSession(call.request, as);
        issueCsrfToken(call.request, call.response, config);
        return noContent();
      },
    }),
  ];

  async function viewAs(as: SignedInAs) {
    return database.asActor({ kind: 'person', id: as.personId },
      (trx) => service.view(trx, as.personId));
  }
}

/** A session id known before sign-in is worth nothing after it. */
function startSession(request: Request, as: SignedInAs): Promise<void> {
  return new Promise((resolve, reject) => request.session.regenerate((error) => {
    if (error) return reject(error);
    request.session.personId = as.personId;
    request.session.epoch = as.epoch;
    request.session.save((failed) => failed ? reject(failed) : resolve());
  }));
}

function endSession(request: Request): Promise<void> {
  return new Promise((resolve, reject) =>
    request.session.regenerate((error) => error ? reject(error) : resolve()));
}

