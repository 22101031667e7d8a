import { randomUUID } from 'node:crypto';
import { createApp } from '#server/app';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { ClubRole } from '#shared/access/audience';
import { addClub, addMember, addPerson, type TestClub } from '#tests/support/factories/people';
import { cameraJpeg } from '#tests/support/factories/pictures';
import { fileReport, publishReport, reportContent, uploadPhoto } from
  '#tests/support/factories/reports';
import { startTestApp, type TestApp } from '#tests/support/test-app';
import type { TestClient } from '#tests/support/test-client';
import { accessMatrix, matrixObjects, matrixRoles, type MatrixObject,
  type MatrixRole } from './access-matrix';

interface TestObject {
  readonly number: string;
  readonly photoId: string;
}

let app: TestApp;
let club: TestClub;
const people = new Map<MatrixRole, { readonly email: string } | undefined>();
const clients = new Map<MatrixRole, TestClient>();
const objects = new Map<MatrixObject, TestObject>();

beforeAll(async () => {
  app = await startTestApp();
  const { owner } = app.store;
  club = await addClub(owner);
  const [named, other] = [await addClub(owner), await addClub(owner)];
  const of = (home: TestClub, ...roles: readonly ClubRole[]) => addMember(owner, home, ...roles);
  people.set('visitor', undefined);
  people.set('subscriber', await addPerson(owner, { roles: ['subscriber'] }));
  people.set('clubSubscriber', await addPerson(owner, { club, roles: ['subscriber'] }));
  people.set('author', await of(club));
  people.set('otherMember', await of(other));
  people.set('namedMember', await of(named));
  people.set('moderator', await of(club, 'moderator'));
  people.set('otherModerator', await of(other, 'moderator'));
  people.set('secretary', await of(club, 'secretary'));
  people.set('registrar', await addPerson(owner, { isRegistrar: true }));
  for (const role of matrixRoles) clients.set(role, await open(role));
  const author = clientOf('author');
  for (const object of matrixObjects) {
    const audience = object === 'filed' ? 'public' : object;
    const photoId = await uploadPhoto(author, await cameraJpeg());
    const number = await fileReport(author, reportContent(club, { audience,
      namedClubs: audience === 'named_clubs' ? [named.slug] : [],
      photos: [{ photoId, side: 'obverse', circle: { x: 0.5, y: 0.5, radius: 0.4 },
        uprightDegrees: 0, caption: '' }] }));
    if (object !== 'filed') await publishReport(owner, number, { audience });
    objects.set(object, { number, photoId });
  }
}, 120_000);
afterAll(() => app.stop());

async function open(role: MatrixRole): Promise<TestClient> {
  const client = app.client();
  await client.get('/api/session');
  const person = people.get(role);
  return person ? client.signIn(person.email) : client;
}

function clientOf(role: MatrixRole): TestClient {
  const client = clients.get(role);
  if (!client) throw new Error(`nobody signed in as ${role}`);
  return client;
}

/** The path with real ids of the object; what the row does not ask for is nobody's. */
function pathOf(route: string, object: TestObject | undefined): string {
  const [, path = ''] = route.split(' ');
  const isPhoto = path.startsWith('/api/photos/');
  return path.replace(':number', object?.number ?? 'TN-26-00042-3')
    .replace(':slug', path.startsWith('/api/coin-types') ? 'us-dollar-morgan' : club.slug)
    .replace(':token', 'nobody-has-this-token')
    .replace(':personId', randomUUID())
    .replace(':file', 'small.webp')
    .replace('/suggestions', '/suggestions?text=crown')
    .replace(':id', isPhoto && object ? object.photoId : randomUUID());
}

/** Refused by every schema, unless what it says is right for the route on an unknown id. */
function bodyOf(route: string): unknown {
  switch (route) {
    case 'PUT /api/clubs/:slug/members/:personId/roles': return { roles: ['member'] };
    case 'POST /api/account-links/:token': return { password: 'a long sentence of words' };
    case 'POST /api/photos': return new FormData();
    case 'POST /unsubscribe/:token':
      return new URLSearchParams({ 'List-Unsubscribe': 'One-Click' });
    default: return { nonsense: true };
  }
}

async function ask(
  client: TestClient, route: string, object: TestObject | undefined,
): Promise<number> {
  const [method = ''] = route.split(' ');
  const path = pathOf(route, object);
  const answer = method === 'GET' || method === 'DELETE'
    ? await client.send(method, path) : await client.send(method, path, bodyOf(route));
  return answer.status;
}

describe('the access matrix', () => {
  it('has a row for every declared route, and no other', () => {
    const declared = app.routes.map(({ method, path }) => `${method.toUpperCase()} ${path}`);
    const rows = accessMatrix.map(({ route }) => route);
    // The interface document's own route is added by the application.
    expect([...rows].sort()).toEqual([...declared, 'GET /api/openapi.json'].sort());
  });

  it('knows every route that Express answers', () => {
    const { config, database, logger, routes } = app;
    const express = createApp({ config, database, logger, routes });
    const mounted = express.router.stack.flatMap(({ route }) => route
      ? route.stack.map(({ method }) => `${method.toUpperCase()} ${route.path}`) : []);
    const rows = new Set(accessMatrix.map(({ route }) => route));
    expect([...new Set(mounted)].filter((each) => !rows.has(each))).toEqual([]);
    expect(mounted.length).toBeGreaterThan(50);
  });

  it.each(accessMatrix.filter(({ route }) => route !== 'DELETE /api/sessions'
    && route !== 'DELETE /api/session'))('$route', async ({ route, cells }) => {
    const asked = 'length' in cells ? [[undefined, cells] as const]
      : matrixObjects.map((object) => [object, cells[object]] as const);
    for (const [object, expected] of asked) {
      const statuses: number[] = [];
      for (const role of matrixRoles) {
        statuses.push(await ask(clientOf(role), route, object && objects.get(object)));
      }
      expect(statuses, `${route} on ${object ?? 'nothing'}: ${matrixRoles.join(' ')}`)
        .toEqual(expected);
    }
  });

  // They end the session that asks, so each is asked with one of its own.
  it.each(accessMatrix.filter(({ route }) => route === 'DELETE /api/sessions'
    || route === 'DELETE /api/session'))('$route', async ({ route, cells }) => {
    const statuses: number[] = [];
    for (const role of matrixRoles) {
      statuses.push(await ask(await open(role), route, undefined));
    }
    expect(statuses).toEqual(cells);
  });

  it('was walked without an unexpected error', () => {
    expect(app.log.filter(({ msg }) => msg === 'unexpected error')).toEqual([]);
  });
});
