import { MatCheckboxHarness } from '@angular/material/checkbox/testing';
import { MatInputHarness } from '@angular/material/input/testing';
import { MatSelectHarness } from '@angular/material/select/testing';
import { ClubView } from '#shared/accounts/session';
import { MailLedgerRow } from '#shared/mail/mail-ledger';

import { openScreen } from '../ui/testing/screen';
import { slugOf } from './club-new/club-new';
import { clubRoutes, registryRoutes } from './clubs.routes';

const routes = [
  { path: 'clubs', children: clubRoutes },
  { path: 'registry', children: registryRoutes },
];
const address = '/api/clubs/quillhaven';

function aClub(changes: Partial<ClubView> = {}): ClubView {
  return {
    slug: 'quillhaven', name: 'Quillhaven Society', postalAddress: '1 Harbour Walk',
    timeZone: 'Europe/Zurich', mayManage: true,
    members: [{
      personId: 'person-1', displayName: 'Ada Fenn', email: 'ada@example.org', roles: ['member'],
      since: '2026-01-02T00:00:00Z',
    }],
    invitations: [{
      id: 'invitation-1', email: 'dora@example.org', roles: ['member'],
      createdAt: '2026-11-29T10:00:00Z', expiresAt: '2026-12-13T10:00:00Z', mailState: 'refused',
    }],
    ...changes,
  };
}

function aMail(changes: Partial<MailLedgerRow> = {}): MailLedgerRow {
  return {
    id: 'mail-1', kind: 'digest', address: 'reader@example.org', state: 'uncertain',
    messageId: null, attempts: 1, notBefore: '2026-11-30T08:00:00Z',
    createdAt: '2026-11-30T08:00:00Z', answer: null, items: 2, ...changes,
  };
}

describe('ClubList', () => {
  it('lists the clubs, and leads on where there is none', async () => {
    const screen = await openScreen(routes, '/clubs');
    expect(screen.text()).toContain('Loading');
    screen.http.expectOne('/api/clubs').flush({ items: [] });
    await screen.settle();
    expect(screen.link('Published reports')).toBeTruthy();
  });
});

describe('ClubPage', () => {
  it('does not hide an invitation whose mail was refused', async () => {
    const screen = await openScreen(routes, '/clubs/quillhaven');
    screen.http.expectOne(address).flush(aClub());
    await screen.settle();
    expect(screen.element.querySelector('.failed')?.textContent).toContain('refused');
  });

  it('changes the roles of one member', async () => {
    const screen = await openScreen(routes, '/clubs/quillhaven');
    screen.http.expectOne(address).flush(aClub());
    await screen.settle();
    screen.button('Change roles').click();
    await screen.settle();
    const moderator = await screen.loader.getHarness(
      MatCheckboxHarness.with({ label: 'moderator', ancestor: 'tn-club-members' }));
    await moderator.check();
    screen.button('Save the roles').click();
    const request = screen.http.expectOne(`${address}/members/person-1/roles`);
    expect(request.request.body).toEqual({ roles: ['member', 'moderator'] });
    request.flush(aClub({
      members: aClub().members.map((each) => ({ ...each, roles: ['member', 'moderator'] })),
    }));
    await screen.settle();
    expect(screen.text()).toContain('member, moderator');
  });

  it('keeps the last secretary and says so', async () => {
    const screen = await openScreen(routes, '/clubs/quillhaven');
    screen.http.expectOne(address).flush(aClub());
    await screen.settle();
    screen.button('Change roles').click();
    await screen.settle();
    screen.button('Save the roles').click();
    screen.http.expectOne(`${address}/members/person-1/roles`).flush(
      { type: 'about:blank', title: '', status: 409, code: 'last_secretary' },
      { status: 409, statusText: 'x' });
    await screen.settle();
    expect(screen.element.querySelector('tn-club-members [role=alert]')?.textContent)
      .toMatch(/secretary/);
  });

  it('invites by mail, and says where the address is wrong', async () => {
    const screen = await openScreen(routes, '/clubs/quillhaven');
    screen.http.expectOne(address).flush(aClub());
    await screen.settle();
    const email = await screen.loader.getHarness(
      MatInputHarness.with({ ancestor: 'tn-club-invitations' }));
    await email.setValue('no address');
    screen.button('Send the invitation').click();
    screen.http.expectNone(`${address}/invitations`);
    await email.setValue('eve@example.org');
    screen.button('Send the invitation').click();
    const request = screen.http.expectOne(`${address}/invitations`);
    expect(request.request.body).toEqual({ email: 'eve@example.org', roles: ['member'] });
    request.flush(aClub());
    await screen.settle();
    expect(screen.text()).toContain('The invitation to eve@example.org is on its way.');
  });

  it('shows those who do not run it neither members nor forms', async () => {
    const screen = await openScreen(routes, '/clubs/quillhaven');
    screen.http.expectOne(address).flush(aClub({ mayManage: false, members: [], invitations: [] }));
    await screen.settle();
    expect(screen.element.querySelector('form')).toBeNull();
    expect(screen.text()).toContain('ask the secretary for an invitation');
  });
});

describe('MailLedger', () => {
  it('settles an uncertain mail by what the registrar knows, and no other mail', async () => {
    const screen = await openScreen(routes, '/registry/mail');
    screen.http.expectOne('/api/registry/mail').flush({
      items: [aMail(), aMail({ id: 'mail-2', state: 'sent', address: 'two@example.org' })],
      next: null,
    });
    await screen.settle();
    expect(() => screen.button('Settle: two@example.org')).toThrow();
    screen.button('Settle: reader@example.org').click();
    await screen.settle();
    screen.button('It arrived').click();
    const request = screen.http.expectOne('/api/registry/mail/mail-1/settlement');
    expect(request.request.body).toEqual({ outcome: 'arrived' });
    request.flush(null, { status: 204, statusText: 'x' });
    screen.http.expectOne('/api/registry/mail').flush({
      items: [aMail({ state: 'settled_sent' })], next: null });
    await screen.settle();
    expect(screen.text()).toContain('settled: it arrived');
  });

  it('keeps the state asked for in the address', async () => {
    const screen = await openScreen(routes, '/registry/mail');
    screen.http.expectOne('/api/registry/mail').flush({ items: [aMail()], next: null });
    await screen.settle();
    const state = await screen.loader.getHarness(MatSelectHarness);
    await state.clickOptions({ text: /^refused/ });
    await screen.settle();
    expect(screen.router.url).toBe('/registry/mail?state=refused');
    screen.http.expectOne('/api/registry/mail?state=refused').flush({ items: [], next: null });
    await screen.settle();
    expect(screen.text()).toContain('No mail in this state');
  });
});

describe('slugOf', () => {
  it('makes an address of a name', () => {
    expect(slugOf('Münzfreunde am See ')).toBe('munzfreunde-am-see');
  });
});
