import { randomUUID } from 'node:crypto';
import type { Knex } from 'knex';
import type { Audience } from '#shared/access/audience';
import type { Confidence, FiledReport, PinPlace,
  ReportContent } from '#shared/reports/report-content';
import type { TestClient } from '../test-client';
import { addClub, addMember, type TestClub } from './people';

/** A complete, modest report; anything in it can be said otherwise. */
export function reportContent(club: TestClub, changes: Partial<ReportContent> = {}): ReportContent {
  return {
    club: club.slug,
    presentedAs: { coinType: 'quillhaven-crown', kind: 'coin', metal: 'silver', description: '',
      year: 1891, mintMark: '' },
    components: [{ kind: 'piece', judgement: 'false', note: '' }],
    pieceCount: 1,
    condition: 'little_worn',
    whereabouts: 'with_owner',
    photos: [],
    tells: [],
    measurements: [{ quantity: 'weight', value: 24.9, unit: 'g', resolution: 0.01 }],
    surfacing: { channel: 'flea_market', surfacedOn: '2026-03-14', country: 'GB',
      region: 'Cumbria', town: 'Brampton', venue: 'Stall 12', price: 34, currency: 'GBP' },
    account: '<p>It was among other crowns.</p>',
    audience: 'clubs',
    namedClubs: [],
    embargoUntil: null,
    photoLicence: 'registry_only',
    authorNamed: false,
    ...changes,
  };
}

export const facePlace = (clockHours: number, radiusFraction: number): PinPlace =>
  ({ side: 'obverse', clockHours, radiusFraction });

/** Files a report through its door and answers its number. */
export async function fileReport(
  client: TestClient, content: ReportContent, id: string = randomUUID(),
): Promise<string> {
  const answer = await client.post<FiledReport>('/api/reports', { id, content });
  if (answer.status !== 201) throw new Error(`filing answered ${answer.status}: ${answer.text}`);
  return answer.body.number;
}

export async function uploadPhoto(
  client: TestClient, bytes: Buffer, id: string = randomUUID(), name = 'photo.jpg',
): Promise<string> {
  const form = new FormData();
  form.set('id', id);
  form.set('photo', new Blob([new Uint8Array(bytes)]), name);
  const answer = await client.send('POST', '/api/photos', form);
  if (answer.status !== 201) throw new Error(`upload answered ${answer.status}: ${answer.text}`);
  return id;
}

/**
 * Publishes the newest version as two moderators of two clubs of its own would, past the review
 * desk: for specs of what readers see.
 */
export async function publishReport(owner: Knex, number: string, publication: {
  readonly audience?: Audience; readonly confidence?: Confidence; readonly at?: string;
} = {}): Promise<void> {
  const { audience = 'clubs', confidence = 'probable' } = publication;
  const at = publication.at ?? new Date().toISOString();
  const report = await owner('report').where({ number }).first('id', 'current_version');
  const version = report.current_version;
  await owner.transaction(async (trx) => {
    await trx('publication').where({ report_id: report.id }).whereRaw('upper_inf(during)')
      .update({ during: trx.raw('tstzrange(lower(during), ?::timestamptz)', [at]),
        ended_as: 'widened' });
    if (audience === 'public') {
      for (const kind of ['publish', 'agree_public']) {
        const club = await addClub(trx);
        const moderator = await addMember(trx, club, 'moderator');
        await trx('decision').insert({ report_id: report.id, version, row_version_seen: 1, kind,
          moderator_id: moderator.id, club_id: club.id, lease_token: 1, confidence,
          basis: ['photographs'], reason: 'The photos show it.' });
      }
    }
    const [row] = await trx('publication').insert({ report_id: report.id, version, audience,
      confidence, basis: ['photographs'],
      during: trx.raw('tstzrange(?::timestamptz, null)', [at]) }).returning('id');
    await trx('report').where({ id: report.id }).update({ state: 'published',
      published_audience: audience, published_version: version, decided_at: at,
      row_version: trx.raw('row_version + 1') });
    await trx.raw('select renew_report_search(?)', [report.id]);
    await trx('registry_event').insert({ kind: 'report_published', report_id: report.id,
      publication_id: row.id });
  });
}
