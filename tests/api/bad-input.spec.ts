import { randomUUID } from 'node:crypto';
import fc from 'fast-check';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { problemCodes } from '#shared/api-problem';
import { addClub, addPerson, type TestClub } from '#tests/support/factories/people';
import { fileReport, reportContent } from '#tests/support/factories/reports';
import { startTestApp, type TestApp } from '#tests/support/test-app';
import type { TestAnswer, TestClient } from '#tests/support/test-client';

const seed = Number(process.env['TEST_SEED'] ?? Math.floor(Math.random() * 2 ** 31));
const runs = 25;

let app: TestApp;
let club: TestClub;
let client: TestClient;
let number: string;
beforeAll(async () => {
  process.stdout.write(`bad-input seed: TEST_SEED=${seed}\n`);
  app = await startTestApp();
  const { owner } = app.store;
  club = await addClub(owner);
  // Every role at once, so that each body gets past the door and into validation.
  const person = await addPerson(owner, { club, isRegistrar: true,
    roles: ['member', 'moderator', 'secretary'] });
  client = await app.client().signIn(person.email);
  number = await fileReport(client, reportContent(club));
});
afterAll(() => app.stop());

/** What a caller may always rely on: no 500, and a refusal is a problem document. */
function expectDecent(answer: TestAnswer<unknown>, what: string): void {
  expect(answer.status, `${what}: ${answer.text}`).not.toBe(500);
  if (answer.status < 400) return;
  expect(answer.headers.get('content-type'), what).toMatch(/^application\/problem\+json/);
  expect(problemCodes, what).toContain((answer.body as { code: string }).code);
}

const pathOf = (path: string): string => path.replace(':number', number)
  .replace(':slug', club.slug).replace(/:(id|personId)/g, () => randomUUID())
  .replace(':token', 'nobody').replace(':file', 'small.webp');

/** Signing out would end the session that asks. */
const endsSession = new Set(['signOut', 'signOutEverywhere', 'changePassword', 'useAccountLink',
  'signIn', 'setRoles']);

const anything = fc.anything({ withNullPrototype: false, maxDepth: 4, values: [
  fc.string({ unit: 'binary' }), fc.constant('\u0000'), fc.constant('\ud800'),
  fc.constant('x'.repeat(70_000)), fc.double(), fc.constant('__proto__'), fc.constant(null)] })
  .filter((value) => JSON.stringify(value) !== undefined);

/** A right body with one part of it replaced by something else, or taken away. */
function mutated(body: object): fc.Arbitrary<unknown> {
  const paths: (readonly (string | number)[])[] = [];
  const visit = (value: unknown, path: readonly (string | number)[]): void => {
    if (path.length) paths.push(path);
    if (Array.isArray(value)) value.forEach((each, at) => visit(each, [...path, at]));
    else if (value && typeof value === 'object') {
      for (const [key, each] of Object.entries(value)) visit(each, [...path, key]);
    }
  };
  visit(body, []);
  return fc.tuple(fc.constantFrom(...paths), fc.oneof(anything, fc.constant(undefined)))
    .map(([path, replacement]) => {
      const copy: Record<string | number, unknown> = structuredClone({ ...body });
      const parent = path.slice(0, -1).reduce<Record<string | number, unknown>>(
        (at, key) => at[key] as Record<string | number, unknown>, copy);
      const last = path.at(-1);
      if (last !== undefined) parent[last] = replacement;
      return copy;
    });
}

const fuzz = (arbitrary: fc.Arbitrary<unknown>, send: (body: unknown) => Promise<void>) =>
  fc.assert(fc.asyncProperty(arbitrary, send), { seed, numRuns: runs });

describe('bodies of every kind', () => {
  it('never bring a JSON operation down', async () => {
    for (const route of app.routes) {
      if (!route.body || route.bodyType || endsSession.has(route.operationId)) continue;
      await fuzz(anything, async (body) => {
        const answer = await client.send(route.method.toUpperCase(), pathOf(route.path),
          JSON.stringify(body), { 'Content-Type': 'application/json' });
        expectDecent(answer, `${route.operationId} with ${JSON.stringify(body)?.slice(0, 300)}`);
      });
    }
  }, 180_000);

  it('that are nearly right are refused by field or taken, never half', async () => {
    const bodies: readonly (readonly [string, string, () => object])[] = [
      ['POST', '/api/reports', () => ({ id: randomUUID(), content: reportContent(club) })],
      ['PUT', `/api/drafts/${randomUUID()}`,
        () => ({ revision: 0, content: reportContent(club) })],
      ['PUT', `/api/watches/${randomUUID()}`, () => ({ name: 'x', cadence: 'daily',
        filter: { text: 'crown', metal: ['silver'], yearFrom: 1800, yearTo: 1900 } })],
      ['POST', `/api/review/reports/${number}/decisions`, () => ({ leaseToken: '1', version: 1,
        rowVersion: 1, kind: 'publish', confidence: 'probable', basis: ['photographs'],
        reason: 'x' })],
    ];
    for (const [method, path, body] of bodies) {
      await fuzz(mutated(body()), async (sent) => {
        const answer = await client.send(method, path, JSON.stringify(sent),
          { 'Content-Type': 'application/json' });
        expectDecent(answer, `${method} ${path} with ${JSON.stringify(sent).slice(0, 300)}`);
      });
    }
  }, 120_000);
});

describe('requests of every kind', () => {
  it.each([
    ['broken JSON', '{"a":', 'application/json', 400],
    ['a body that is no JSON', 'text', 'text/plain', 422],
    ['a body that is too large', JSON.stringify({ a: 'x'.repeat(600_000) }),
      'application/json', 413],
    ['an unknown character set', '{}', 'application/json; charset=nonsense', 400],
    ['deep nesting', `${'['.repeat(20_000)}${']'.repeat(20_000)}`, 'application/json', 422],
    ['keys of prototypes', '{"__proto__": {"a": 1}, "constructor": 1}', 'application/json', 422],
  ])('%s', async (_, body, type, status) => {
    const answer = await client.send('POST', '/api/reports', body, { 'Content-Type': type });
    expectDecent(answer, body.slice(0, 60));
    expect(answer.status).toBe(status);
  });

  it.each(['?limit=-1', '?limit=1e9', '?after=garbage', '?after=%00', '?text=%00', '?text=%F0%9F',
    '?metal=silver&metal=gold&metal=', '?yearFrom=abc', '?__proto__[x]=1', '?unknown=1',
    `?text=${'x'.repeat(5000)}`, '?text=%27%3B--', '?coinType[]=x', '?text="', '?text=!', '?text=-',
    '?text=%26%7C%21%3A%2A', '?text=a%20OR%20', '?after=eyJhIjoxfQ'])(
    'a search by %s', async (query) => {
      for (const path of ['/api/reports', '/api/review/queue', '/api/coin-types',
        '/api/my/reports', '/api/registry/mail', '/api/reports/suggestions']) {
        expectDecent(await client.get(path + query), path + query);
      }
    });

  it.each(['%00', '%F0%9F', '..%2F..%2Fetc', 'TN-26-00042-4', '%E0%A4%A', 'a'.repeat(3000), '%25'])(
    'a path with %s', async (part) => {
      for (const path of ['/api/reports/', '/api/coin-types/', '/api/clubs/', '/api/drafts/',
        '/api/photos/', '/api/my/reports/', '/api/review/reports/', '/api/account-links/']) {
        expectDecent(await client.get(path + part), path + part);
      }
    });

  it('left nothing unexpected in the log', () => {
    expect(app.log.filter(({ msg }) => msg === 'unexpected error')).toEqual([]);
  });
});
