import { randomUUID } from 'node:crypto';
import type { Knex } from 'knex';
import { accountLinkHash, accountLinkToken } from '#server/accounts/account-link';
import { unsubscribeToken } from '#server/watches/unsubscribe-token';
import type { LeaseView, ReviewView } from '#shared/review/review';
import { addClub, addMember, addPerson } from '#tests/support/factories/people';
import { cameraJpeg } from '#tests/support/factories/pictures';
import { facePlace, fileReport, publishReport, reportContent,
  uploadPhoto } from '#tests/support/factories/reports';
import type { TestClient } from '#tests/support/test-client';
import type { RunningRegistry } from './running-registry';

export const mailTokenKey = 'm'.repeat(32);

/** One of everything that a screen can show, and who may see it. */
export interface World {
  readonly club: string;
  readonly member: string;
  readonly moderator: string;
  readonly registrar: string;
  /** Signed in, with nothing of their own yet. */
  readonly newcomer: string;
  readonly published: string;
  readonly waiting: string;
  readonly returned: string;
  readonly draft: string;
  readonly resetToken: string;
  readonly setupToken: string;
  readonly unsubscribeToken: string;
}

/** Builds it through the doors that people use, where there is one. */
export async function buildWorld(registry: RunningRegistry): Promise<World> {
  const { owner } = registry.store;
  const club = await addClub(owner);
  const other = await addClub(owner);
  const member = await addMember(owner, club, 'secretary');
  const moderator = await addMember(owner, other, 'moderator');
  const registrar = await addPerson(owner, { isRegistrar: true });
  const newcomer = await addMember(owner, other);
  const files = await registry.client().signIn(member.email);
  const decides = await registry.client().signIn(moderator.email);

  const photos = await Promise.all([0, 1].map(async () => uploadPhoto(files, await cameraJpeg())));
  const [obverse = '', reverse = ''] = photos;
  const circle = { x: 0.5, y: 0.5, radius: 0.45 };
  const published = await fileReport(files, reportContent(club, {
    audience: 'public',
    photos: [
      { photoId: obverse, side: 'obverse', circle, uprightDegrees: 0, caption: '' },
      { photoId: reverse, side: 'reverse', circle, uprightDegrees: 0, caption: 'side light' },
    ],
    tells: [{ tellId: await anyTell(files), note: 'by the date', disclosure: 'public',
      pins: [{ id: randomUUID(), photoId: obverse, place: facePlace(3, 0.5), note: '' }] }],
  }));
  await publishReport(owner, published, { audience: 'public' });
  const returned = await fileReport(files, reportContent(club));
  await returnReport(decides, returned);
  const waiting = await fileReport(files, reportContent(club, { audience: 'public' }));

  const draft = randomUUID();
  await ok(files.put(`/api/drafts/${draft}`, { revision: 0, content: { pieceCount: 1 } }));
  await ok(files.put(`/api/watches/${randomUUID()}`,
    { name: 'Old silver', filter: { metal: ['silver'], yearTo: 1900 }, cadence: 'weekly' }));
  return {
    club: club.slug, member: member.email, moderator: moderator.email,
    registrar: registrar.email, newcomer: newcomer.email, published, waiting, returned, draft,
    resetToken: await addLink(owner, { kind: 'reset', email: member.email, person_id: member.id }),
    setupToken: await addLink(owner, { kind: 'first_registrar' }),
    unsubscribeToken: unsubscribeToken(member.id, mailTokenKey),
  };
}

async function anyTell(client: TestClient): Promise<string> {
  const { body } = await client.get<{ tells: readonly { id: string }[] }>('/api/tells');
  const [tell] = body.tells;
  if (!tell) throw new Error('the taxonomy is empty');
  return tell.id;
}

async function returnReport(moderator: TestClient, number: string): Promise<void> {
  const address = `/api/review/reports/${number}`;
  const { body: { report } } = await ok(moderator.get<ReviewView>(address));
  const { body: lease } = await ok(moderator.post<LeaseView>(`${address}/lease`, {}));
  await ok(moderator.post(`${address}/decisions`, { leaseToken: lease.token,
    version: report.version, rowVersion: report.rowVersion, kind: 'return', confidence: null,
    basis: [], reason: 'Please add a photo of the edge.' }));
}

/** A link as its mail would bring it; the table holds only a hash of the token. */
async function addLink(owner: Knex, link: {
  readonly kind: string; readonly email?: string; readonly person_id?: string;
}): Promise<string> {
  const id = randomUUID();
  const token = accountLinkToken(id, mailTokenKey);
  await owner('account_link').insert({ id, ...link, token_hash: accountLinkHash(token),
    expires_at: owner.raw(`now() + interval '1 day'`) });
  return token;
}

async function ok<Answer extends { readonly status: number; readonly text: string }>(
  answering: Promise<Answer>,
): Promise<Answer> {
  const answer = await answering;
  if (answer.status >= 300) throw new Error(`${answer.status}: ${answer.text}`);
  return answer;
}
