import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { accountLinkToken } from '#server/accounts/account-link';
import { addClub, addMember, addPerson } from '#tests/support/factories/people';
import { startTestApp, type TestApp } from '#tests/support/test-app';
import { testPassword } from '#tests/support/test-client';

let app: TestApp;
beforeAll(async () => { app = await startTestApp(); });
afterAll(() => app.stop());

interface Session { person: { email: string; memberships: { roles: string[] }[] } | null }

describe('sign-in', () => {
  it('renews the session id and says who is signed in, with roles', async () => {
    const club = await addClub(app.store.owner);
    const person = await addMember(app.store.owner, club, 'moderator');
    const client = app.client();
    await client.signIn(person.email);
    const first = client.cookieHeader();
    await client.signIn(person.email);
    expect(client.cookieHeader()).not.toBe(first);
    const { body } = await client.get<Session>('/api/session');
    expect(body.person?.memberships[0]?.roles).toEqual(['member', 'moderator']);
  });

  it('answers an unknown address as a wrong password', async () => {
    const person = await addPerson(app.store.owner);
    const client = app.client();
    await client.get('/api/session');
    const wrong = await client.post('/api/session', { email: person.email, password: 'x' });
    const unknown = await client.post('/api/session', { email: 'no@example.org', password: 'x' });
    expect([wrong.status, wrong.body]).toEqual([unknown.status, unknown.body]);
    expect(wrong.status).toBe(401);
  });

  it('stops tries on one address, wherever they come from', async () => {
    const person = await addPerson(app.store.owner);
    const statuses: number[] = [];
    for (let attempt = 0; attempt < 11; attempt++) {
      const client = app.client();
      await client.get('/api/session');
      statuses.push((await client.post('/api/session',
        { email: person.email, password: 'wrong' })).status);
    }
    expect(statuses.slice(0, 10).every((status) => status === 401)).toBe(true);
    expect(statuses.at(-1)).toBe(429);
  });

  it('signs out everywhere', async () => {
    const person = await addPerson(app.store.owner);
    const one = await app.client().signIn(person.email);
    const other = await app.client().signIn(person.email);
    expect((await one.delete('/api/sessions')).status).toBe(204);
    expect((await other.get<Session>('/api/session')).body.person).toBeNull();
    expect(await app.store.owner('session').where({ person_id: person.id })).toHaveLength(0);
  });

  it('sets a cookie that scripts cannot read and other sites do not send', async () => {
    const person = await addPerson(app.store.owner);
    const client = app.client();
    await client.get('/api/session');
    const answer = await client.post('/api/session',
      { email: person.email, password: testPassword });
    const cookie = answer.headers.getSetCookie().find((each) => each.includes('session='));
    expect(cookie).toMatch(/HttpOnly/);
    expect(cookie).toMatch(/SameSite=Lax/);
  });
});

describe('a visitor', () => {
  it('leaves no row behind in 50 page loads', async () => {
    const rows = async (): Promise<number[]> => Promise.all(['session', 'audit_entry', 'person']
      .map(async (table) => Number((await app.store.owner(table).count())[0]?.['count'])));
    const before = await rows();
    for (let load = 0; load < 50; load++) {
      const client = app.client();
      await client.get('/');
      expect((await client.get('/api/session')).status).toBe(200);
    }
    expect(await rows()).toEqual(before);
  });
});

describe('writes from elsewhere', () => {
  it('are refused without the token, with a wrong one, and from another origin', async () => {
    const person = await addPerson(app.store.owner);
    const client = await app.client().signIn(person.email);
    const refused = [
      await client.send('PATCH', '/api/account', { displayName: 'X' }, { 'X-XSRF-TOKEN': '' }),
      await client.send('PATCH', '/api/account', { displayName: 'X' },
        { 'X-XSRF-TOKEN': 'abc.def' }),
      await client.send('PATCH', '/api/account', { displayName: 'X' },
        { Origin: 'https://elsewhere.example' }),
    ];
    expect(refused.map(({ status }) => status)).toEqual([403, 403, 403]);
    expect((await client.patch('/api/account', { displayName: 'X' })).status).toBe(200);
  });
});

describe('mailed links', () => {
  it('register, reset and are good once; the answer never tells whether an address is known',
    async () => {
      const client = app.client();
      await client.get('/api/session');
      const known = await addPerson(app.store.owner);
      for (const email of ['new@example.org', known.email]) {
        expect((await client.post('/api/registrations', { email, displayName: 'New' })).status)
          .toBe(202);
      }
      const link = await app.store.owner('account_link').where({ email: 'new@example.org' })
        .first();
      const token = accountLinkToken(link.id, app.config.mailTokenKey);
      const short = await client.post(`/api/account-links/${token}`, { password: 'too short' });
      expect(short.status).toBe(422);
      const used = await client.post<Session>(`/api/account-links/${token}`,
        { password: testPassword });
      expect(used.body.person?.email).toBe('new@example.org');
      expect((await client.post(`/api/account-links/${token}`, { password: testPassword })).status)
        .toBe(404);
      const reset = await app.store.owner('account_link').where({ email: known.email }).first();
      expect(reset.kind).toBe('reset');
    });

  it('refuse a password that bcrypt would cut', async () => {
    const person = await addPerson(app.store.owner);
    const client = await app.client().signIn(person.email);
    const answer = await client.put<{ fields: { field: string; code: string }[] }>(
      '/api/account/password', { current: testPassword, password: 'ä'.repeat(37) });
    expect(answer.status).toBe(422);
    expect(answer.body.fields[0]?.field).toBe('password');
  });
});

describe('clubs', () => {
  it('are run by their own secretary, who cannot take the last secretary away', async () => {
    const { owner } = app.store;
    const [club, other] = [await addClub(owner), await addClub(owner)];
    const secretary = await addMember(owner, club, 'secretary');
    const member = await addMember(owner, club);
    const client = await app.client().signIn(secretary.email);
    expect((await client.patch(`/api/clubs/${other.slug}`, { name: 'Mine' })).status).toBe(403);
    const granted = await client.put<{ members: { personId: string; roles: string[] }[] }>(
      `/api/clubs/${club.slug}/members/${member.id}/roles`, { roles: ['moderator'] });
    expect(granted.body.members.find(({ personId }) => personId === member.id)?.roles)
      .toEqual(['member', 'moderator']);
    const last = await client.put<{ code: string }>(
      `/api/clubs/${club.slug}/members/${secretary.id}/roles`, { roles: ['member'] });
    expect([last.status, last.body.code]).toEqual([409, 'last_secretary']);
    const ended = await client.put(`/api/clubs/${club.slug}/members/${member.id}/roles`,
      { roles: [] });
    expect(ended.status).toBe(200);
  });

  it('invite by mail, and show what became of the mail', async () => {
    const { owner } = app.store;
    const club = await addClub(owner);
    const secretary = await addMember(owner, club, 'secretary');
    const client = await app.client().signIn(secretary.email);
    const invited = await client.post<{ invitations: { id: string; mailState: string }[] }>(
      `/api/clubs/${club.slug}/invitations`, { email: 'ada@example.org', roles: ['member'] });
    expect(invited.status).toBe(201);
    const [invitation] = invited.body.invitations;
    expect(invitation?.mailState).toBe('reserved');
    const token = accountLinkToken(invitation?.id ?? '', app.config.mailTokenKey);
    const ada = app.client();
    await ada.get('/api/session');
    const accepted = await ada.post<Session>(`/api/account-links/${token}`,
      { password: testPassword, displayName: 'Ada' });
    expect(accepted.body.person?.memberships).toEqual([
      { club: { slug: club.slug, name: expect.any(String) }, roles: ['member'] }]);
  });
});

describe('the audit log', () => {
  it('is a chain in the order of commits that nobody can change', async () => {
    const { owner } = app.store;
    const { rows } = await owner.raw(`select chain_position, previous_hash, hash from audit_entry
      order by chain_position`);
    expect(rows.length).toBeGreaterThan(1);
    for (let at = 1; at < rows.length; at++) {
      expect(rows[at].previous_hash).toEqual(rows[at - 1].hash);
    }
    await expect(owner('audit_entry').update({ act: 'other' })).rejects.toThrow(/append-only/);
    await expect(owner('audit_entry').delete()).rejects.toThrow(/append-only/);
  });
});
