import { randomUUID } from 'node:crypto';
import { request } from 'node:http';
import { Ajv2020, type ValidateFunction } from 'ajv/dist/2020';
import addFormats from 'ajv-formats';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { accountLinkToken } from '#server/accounts/account-link';
import { unsubscribeToken } from '#server/watches/unsubscribe-token';
import { addClub, addPerson } from '#tests/support/factories/people';
import { cameraJpeg } from '#tests/support/factories/pictures';
import { reportContent } from '#tests/support/factories/reports';
import { startTestApp, type TestApp } from '#tests/support/test-app';
import { testPassword, type TestClient } from '#tests/support/test-client';

interface Operation {
  readonly operationId: string;
  readonly security: readonly unknown[];
  readonly responses: Readonly<Record<string, {
    readonly content?: Readonly<Record<string, object>>;
  }>>;
}

interface InterfaceDocument {
  readonly openapi: string;
  readonly paths: Readonly<Record<string, Readonly<Record<string, Operation>>>>;
}

let app: TestApp;
let document: InterfaceDocument;
let ajv: Ajv2020;
/** Statuses seen by operation. */
const seen = new Map<string, Set<number>>();

beforeAll(async () => {
  app = await startTestApp();
  document = (await app.client().get<InterfaceDocument>('/api/openapi.json')).body;
  ajv = new Ajv2020({ strict: false, allErrors: true });
  addFormats(ajv);
  ajv.addSchema(document, 'document');
});
afterAll(() => app.stop());

function operationOf(method: string, template: string): Operation {
  const operation = document.paths[template.replace(/:(\w+)/g, '{$1}')]?.[method.toLowerCase()];
  if (!operation) throw new Error(`the document has no ${method} ${template}`);
  return operation;
}

/** The schema as served, found by its place in the document so that its references resolve. */
function validatorOf(
  method: string, template: string, status: number, type: string,
): ValidateFunction | undefined {
  const path = template.replace(/:(\w+)/g, '{$1}').replaceAll('~', '~0').replaceAll('/', '~1');
  const pointer = `document#/paths/${encodeURI(path)}/${method.toLowerCase()}/responses/${status}`
    + `/content/${type.replace('/', '~1')}/schema`;
  return ajv.getSchema(pointer);
}

/** Asks, and holds the answer against the document as served. */
async function call<Body = unknown>(
  client: TestClient, method: string, template: string,
  parameters: Readonly<Record<string, string>> = {}, body?: unknown, query = '',
): Promise<{ status: number; body: Body }> {
  const path = template.replace(/:(\w+)/g, (_, name: string) => parameters[name] ?? '');
  const answer = await client.send<Body>(method, path + query, body);
  hold(method, template, answer.status, answer.headers.get('content-type') ?? '', answer.body);
  return answer;
}

function hold(
  method: string, template: string, status: number, contentType: string, body: unknown,
): void {
  const operation = operationOf(method, template);
  const statuses = seen.get(operation.operationId) ?? new Set<number>();
  seen.set(operation.operationId, statuses.add(status));
  const where = `${method} ${template} → ${status}`;
  const declared = operation.responses[String(status)];
  expect(declared, `${where} is not in the document: ${JSON.stringify(body)}`).toBeDefined();
  const [type = ''] = contentType.split(';');
  if (!declared?.content) {
    expect(body, where).toBe('');
    return;
  }
  // A media range, such as image/*, stands for its types.
  const isDeclared = Object.keys(declared.content).some((range) => range === type
    || (range.endsWith('/*') && type.startsWith(range.slice(0, -1))));
  expect(isDeclared, `${where} as ${type}`).toBe(true);
  if (!/json/.test(type)) return;
  const validate = validatorOf(method, template, status, type);
  if (!validate) throw new Error(`${where} has no schema in the document`);
  expect(validate(body), `${where}: ${ajv.errorsText(validate.errors)}`).toBe(true);
}

/** A refusal that every route shares: a body that is no JSON. */
function sendBrokenJson(method: string, template: string, path: string): Promise<void> {
  return new Promise((resolve, reject) => {
    const sent = request(app.baseUrl + path, { method,
      headers: { 'Content-Type': 'application/json', 'Content-Length': 1 } }, (answer) => {
      let text = '';
      answer.setEncoding('utf8').on('data', (part) => { text += part; }).on('end', () => {
        try {
          hold(method, template, answer.statusCode ?? 0,
            String(answer.headers['content-type']), JSON.parse(text));
          resolve();
        } catch (error) {
          reject(error);
        }
      });
    });
    sent.on('error', reject).end('{');
  });
}

describe('the interface document', () => {
  it('is OpenAPI 3.1 and says of each operation who may call it', () => {
    expect(document.openapi).toBe('3.1.0');
    for (const { method, path, access } of app.routes) {
      expect(operationOf(method, path).security, `${method} ${path}`)
        .toEqual(access.kind === 'public' ? [] : [{ session: [] }]);
    }
    const ids = Object.values(document.paths).flatMap((path) =>
      Object.values(path).map(({ operationId }) => operationId));
    expect(new Set(ids).size).toBe(ids.length);
  });

  it('holds for the whole job, as it is done', async () => {
    const { owner } = app.store;
    const [club, other] = [await addClub(owner), await addClub(owner)];
    const open = async (person: { email: string }) => app.client().signIn(person.email);
    const author = await open(await addPerson(owner, { club,
      roles: ['member', 'secretary'] }));
    const moderator = await open(await addPerson(owner, { club: other,
      roles: ['member', 'moderator'] }));
    const registrar = await open(await addPerson(owner, { isRegistrar: true }));
    await accounts();
    await clubs(author, registrar, club.slug);
    const visitor = app.client();
    for (const path of ['/api/health', '/api/openapi.json', '/api/coin-types', '/api/tells',
      '/api/reports']) {
      await call(visitor, 'GET', path);
    }
    await call(visitor, 'GET', '/api/coin-types/:slug', { slug: 'us-dollar-morgan' });
    await call(visitor, 'GET', '/api/coin-types/:slug', { slug: 'no-such-type' });
    await call(visitor, 'GET', '/api/reports/suggestions', {}, undefined, '?text=morgan');
    await call(visitor, 'GET', '/api/reports', {}, undefined, '?limit=0');
    await call(visitor, 'GET', '/api/reports/suggestions');

    const photoId = await photos(author);
    const draftId = randomUUID();
    await call(author, 'PUT', '/api/drafts/:id', { id: draftId },
      { revision: 0, content: { account: 'begun' } });
    await call(author, 'PUT', '/api/drafts/:id', { id: draftId },
      { revision: 7, content: { account: 'elsewhere' } });
    await call(author, 'GET', '/api/drafts');
    await call(author, 'GET', '/api/drafts/:id', { id: draftId });
    await call(author, 'GET', '/api/drafts/:id', { id: randomUUID() });
    await call(author, 'DELETE', '/api/drafts/:id', { id: randomUUID() });

    const content = reportContent(club, { audience: 'clubs', photos: [{ photoId,
      side: 'obverse', circle: { x: 0.5, y: 0.5, radius: 0.4 }, uprightDegrees: 0,
      caption: '' }] });
    const filed = await call<{ number: string }>(author, 'POST', '/api/reports', {},
      { id: draftId, content });
    expect(filed.status).toBe(201);
    await call(author, 'POST', '/api/reports', {}, { id: draftId, content });
    const { number } = filed.body;
    await review(moderator, author, number, content);
    await call(author, 'GET', '/api/reports/:number', { number });
    await call(visitor, 'GET', '/api/reports/:number', { number });
    await call(author, 'GET', '/api/reports');
    await withdraw(author, content);
    await watches(author);
    await call(registrar, 'GET', '/api/registry/mail');
    await settle(registrar);
  });

  it('is exercised whole: every operation once with success, once refused', async () => {
    const visitor = app.client();
    await visitor.get('/api/session');
    for (const { method, path, operationId, access } of
      [...app.routes, { method: 'get' as const, path: '/api/openapi.json',
        operationId: 'getInterfaceDocument', access: { kind: 'public' as const } }]) {
      const refused = [...seen.get(operationId) ?? []].some((status) => status >= 400);
      if (refused) continue;
      const filled = path.replace(/:(id|personId)/g, randomUUID()).replace(/:\w+/g, 'nothing');
      if (access.kind === 'roles') await call(visitor, method.toUpperCase(), path,
        { id: randomUUID(), personId: randomUUID(), number: 'nothing', slug: 'nothing' });
      else await sendBrokenJson(method.toUpperCase(), path, filled);
    }
    const lacking = app.routes.flatMap(({ operationId }) => {
      const statuses = [...seen.get(operationId) ?? []];
      return statuses.some((status) => status < 300) && statuses.some((status) => status >= 400)
        ? [] : [`${operationId}: ${statuses.join(', ')}`];
    });
    expect(lacking).toEqual([]);
  });
});

async function accounts(): Promise<void> {
  const client = app.client();
  const email = `${randomUUID()}@example.org`;
  await call(client, 'GET', '/api/session');
  await call(client, 'POST', '/api/registrations', {}, { email, displayName: 'Ada' });
  await call(client, 'POST', '/api/registrations', {}, { email: 'no address' });
  await call(client, 'POST', '/api/password-resets', {}, { email });
  const link = await app.store.owner('account_link').where({ email }).first();
  const token = accountLinkToken(link.id, app.config.mailTokenKey);
  await call(client, 'GET', '/api/account-links/:token', { token });
  await call(client, 'GET', '/api/account-links/:token', { token: 'wrong' });
  await call(client, 'POST', '/api/account-links/:token', { token }, { password: testPassword });
  await call(client, 'POST', '/api/account-links/:token', { token }, { password: testPassword });
  await call(client, 'PATCH', '/api/account', {}, { timeZone: 'Europe/Berlin' });
  await call(client, 'PATCH', '/api/account', {}, { timeZone: 'Nowhere/Land' });
  await call(client, 'PUT', '/api/account/password', {},
    { current: testPassword, password: 'another sentence of words' });
  await call(client, 'GET', '/api/notices');
  await call(client, 'DELETE', '/api/session');
  await call(client, 'POST', '/api/session', {},
    { email, password: 'another sentence of words' });
  await call(client, 'POST', '/api/session', {}, { email, password: 'wrong' });
  await call(client, 'DELETE', '/api/sessions');
}

async function clubs(
  secretary: TestClient, registrar: TestClient, slug: string,
): Promise<void> {
  await call(registrar, 'POST', '/api/clubs', {}, { name: 'Fen Coin Circle',
    slug: `fen-${randomUUID().slice(0, 8)}`, postalAddress: '', timeZone: 'UTC',
    secretaryEmail: 'secretary@example.org' });
  await call(registrar, 'POST', '/api/clubs', {}, { name: '' });
  await call(secretary, 'GET', '/api/clubs');
  await call(secretary, 'PATCH', '/api/clubs/:slug', { slug }, { postalAddress: '1 Quay' });
  const invited = await call<{ invitations: { id: string }[];
    members: { personId: string }[] }>(secretary, 'POST', '/api/clubs/:slug/invitations',
    { slug }, { email: 'new@example.org', roles: ['member'] });
  await call(secretary, 'GET', '/api/clubs/:slug', { slug });
  await call(secretary, 'GET', '/api/clubs/:slug', { slug: 'no-club' });
  await call(secretary, 'DELETE', '/api/clubs/:slug/invitations/:id',
    { slug, id: invited.body.invitations[0]?.id ?? '' });
  await call(secretary, 'DELETE', '/api/clubs/:slug/invitations/:id', { slug, id: randomUUID() });
  const personId = invited.body.members[0]?.personId ?? '';
  await call(secretary, 'PUT', '/api/clubs/:slug/members/:personId/roles', { slug, personId },
    { roles: ['member', 'secretary'] });
  await call(secretary, 'PUT', '/api/clubs/:slug/members/:personId/roles', { slug, personId },
    { roles: ['member'] });
}

async function photos(author: TestClient): Promise<string> {
  const id = randomUUID();
  const form = async (photoId: string, bytes: Buffer): Promise<FormData> => {
    const data = new FormData();
    data.set('id', photoId);
    data.set('photo', new Blob([new Uint8Array(bytes)]), 'photo.jpg');
    return data;
  };
  await call(author, 'POST', '/api/photos', {}, await form(id, await cameraJpeg()));
  await call(author, 'POST', '/api/photos', {}, await form(id, await cameraJpeg()));
  await call(author, 'POST', '/api/photos', {}, await form(randomUUID(), Buffer.from('no photo')));
  await call(author, 'GET', '/api/photos/:id', { id });
  await call(author, 'GET', '/api/photos/:id', { id: randomUUID() });
  await call(author, 'PUT', '/api/photos/:id/blurs', { id },
    { blurs: [{ x: 0.1, y: 0.1, width: 0.2, height: 0.2 }] });
  await call(author, 'PUT', '/api/photos/:id/blurs', { id }, { blurs: [{ x: 7 }] });
  await call(author, 'GET', '/api/photos/:id/:file', { id, file: 'small.webp' });
  await call(app.client(), 'GET', '/api/photos/:id/:file', { id, file: 'small.webp' });
  const unused = randomUUID();
  await call(author, 'POST', '/api/photos', {}, await form(unused, await cameraJpeg()));
  await call(author, 'DELETE', '/api/photos/:id', { id: unused });
  await call(author, 'DELETE', '/api/photos/:id', { id: randomUUID() });
  return id;
}

async function review(
  moderator: TestClient, author: TestClient, number: string, content: object,
): Promise<void> {
  const decide = async (kind: string, confidence: string | null): Promise<void> => {
    const lease = await call<{ token: string }>(moderator, 'POST',
      '/api/review/reports/:number/lease', { number });
    const { body } = await call<{ report: { version: number; rowVersion: number } }>(moderator,
      'GET', '/api/review/reports/:number', { number });
    const decided = await call(moderator, 'POST', '/api/review/reports/:number/decisions',
      { number }, { leaseToken: lease.body.token, version: body.report.version,
        rowVersion: body.report.rowVersion, kind, confidence,
        basis: confidence ? ['photographs'] : [], reason: 'It is plain to see.' });
    expect(decided.status).toBe(200);
  };
  await call(moderator, 'GET', '/api/review/queue');
  await call(moderator, 'GET', '/api/review/queue', {}, undefined, '?limit=0');
  await call(moderator, 'GET', '/api/review/reports/:number', { number: 'TN-26-00042-3' });
  await decide('return', null);
  const mine = await call<{ rowVersion: number }>(author, 'GET',
    '/api/my/reports/:number/content', { number });
  await call(author, 'PUT', '/api/my/reports/:number/content', { number },
    { rowVersion: mine.body.rowVersion + 5, content });
  await call(author, 'PUT', '/api/my/reports/:number/content', { number },
    { rowVersion: mine.body.rowVersion, content });
  await call(author, 'GET', '/api/my/reports');
  await call(author, 'GET', '/api/my/reports/:number', { number });
  await decide('publish', 'probable');
  await call(moderator, 'POST', '/api/review/reports/:number/lease', { number });
  await call(moderator, 'DELETE', '/api/review/reports/:number/lease', { number });
  const notices = await call<{ items: { id: string }[] }>(author, 'GET', '/api/notices');
  await call(author, 'PUT', '/api/notices/:id/read', { id: notices.body.items[0]?.id ?? '' });
  await call(author, 'PUT', '/api/notices/:id/read', { id: randomUUID() });
  await call(moderator, 'POST', '/api/review/reports/:number/conflict', { number },
    { note: 'I know the owner.' });
}

async function withdraw(author: TestClient, content: object): Promise<void> {
  const filed = await call<{ number: string }>(author, 'POST', '/api/reports', {},
    { id: randomUUID(), content: { ...content, photos: [] } });
  const { number } = filed.body;
  const mine = await call<{ rowVersion: number }>(author, 'GET',
    '/api/my/reports/:number/content', { number });
  await call(author, 'POST', '/api/my/reports/:number/withdrawal', { number },
    { rowVersion: mine.body.rowVersion });
  await call(author, 'POST', '/api/my/reports/:number/withdrawal', { number },
    { rowVersion: mine.body.rowVersion });
}

async function watches(client: TestClient): Promise<void> {
  const id = randomUUID();
  const watch = { name: 'Silver', filter: { metal: ['silver'] }, cadence: 'weekly' };
  await call(client, 'PUT', '/api/watches/:id', { id }, watch);
  await call(client, 'PUT', '/api/watches/:id', { id }, { ...watch, cadence: 'hourly' });
  await call(client, 'GET', '/api/watches');
  await call(client, 'POST', '/api/watches/preview', {}, { filter: { metal: ['silver'] } });
  const { person_id: personId } = await app.store.owner('watch').where({ id }).first();
  const token = unsubscribeToken(personId, app.config.mailTokenKey);
  await call(client, 'GET', '/api/unsubscribe/:token', { token });
  await call(client, 'GET', '/api/unsubscribe/:token', { token: 'forged' });
  await call(client, 'POST', '/api/unsubscribe/:token', { token });
  await call(client, 'POST', '/api/unsubscribe/:token', { token: 'forged' });
  await call(client, 'POST', '/unsubscribe/:token', { token },
    new URLSearchParams({ 'List-Unsubscribe': 'One-Click' }));
  await call(client, 'POST', '/unsubscribe/:token', { token: 'forged' },
    new URLSearchParams({ 'List-Unsubscribe': 'One-Click' }));
  await call(client, 'DELETE', '/api/watches/:id', { id });
  await call(client, 'DELETE', '/api/watches/:id', { id: randomUUID() });
}

async function settle(registrar: TestClient): Promise<void> {
  const mail = await app.store.owner('mail').where({ kind: 'notice' }).first('id');
  await app.store.owner('mail').where({ id: mail.id }).update({ state: 'uncertain',
    frozen_at: new Date(), message_id: `<${mail.id}@example.org>` });
  await call(registrar, 'POST', '/api/registry/mail/:id/settlement', { id: mail.id },
    { outcome: 'arrived' });
  await call(registrar, 'POST', '/api/registry/mail/:id/settlement', { id: mail.id },
    { outcome: 'arrived' });
}
