import { createHash } from 'node:crypto';
import { readFileSync } from 'node:fs';
import { mkdir } from 'node:fs/promises';
import { join } from 'node:path';
import type { Knex } from 'knex';
import { createPasswords } from '#server/accounts/passwords';
import { readConfig, type Config } from '#server/config';
import { openDatabase, type Database } from '#server/db/database';
import { createPhotoDecoder } from '#server/images/photo-decoder';
import { createDiskPhotoStore } from '#server/images/photo-store';
import { createPhotosService } from '#server/photos/photos-service';
import { createFilingService } from '#server/reports/filing-service';
import { seedCatalogue } from '../catalogue';
import { decideAsDemo } from './demo-decisions';
import { drawDemoPhotos, type DemoPhoto } from './demo-photos';
import { demoClubs, demoMakers, demoReports, type DemoReport } from './scenario';

/** Past the doors only where time has to be set back: everything else goes through the services. */
interface Parts {
  readonly owner: Knex;
  readonly config: Config;
  readonly database: Database;
  readonly people: ReadonlyMap<string, string>;
}

interface DemoAccount {
  readonly email: string;
  readonly name: string;
  readonly role: string;
  readonly club: string;
  readonly password: string;
}

/** A data file, since the start script, which knows no TypeScript, prints it. */
const accounts: readonly DemoAccount[] = JSON.parse(
  readFileSync(join(import.meta.dirname, '../demo-accounts.json'), 'utf8'));

/** Tells of the edge or of the whole piece: no pin on a face can show them. */
const notOnAFace = new Set(['edge-seam', 'sharp-rim', 'dull-ring', 'wrong-density']);

const dayMilliseconds = 24 * 3600 * 1000;

/**
 * Fills a registry that has nobody of its own with the demonstration. Safe to run again, also
 * after a start that was broken off: what is there is left alone. Says what it did.
 */
export async function seedDemo(
  owner: Knex, environment: Readonly<Record<string, string | undefined>>,
): Promise<string> {
  const strangers = await owner('person').whereNotIn('email', accounts.map(({ email }) => email))
    .first('id');
  if (strangers && !await owner('club').where({ slug: demoClubs[0].slug }).first('id')) {
    return 'The registry has people of its own: no demonstration was added.';
  }
  const missing = await findMissing(owner);
  if (!missing.length) return 'The demonstration is there.';
  await seedCatalogue(owner);
  const config = readConfig(environment);
  const people = await addPeople(owner, config);
  const database = openDatabase(config.databaseUrl, 4, () => undefined);
  const decoder = createPhotoDecoder();
  try {
    const incoming = join(config.photoDirectory, 'incoming');
    await mkdir(incoming, { recursive: true });
    const photos = createPhotosService({ database, decoder, incoming,
      store: createDiskPhotoStore(join(config.photoDirectory, 'kept')) });
    for (const at of missing) {
      const report = demoReports[at];
      if (!report) continue;
      await addReport({ owner, config, database, people }, photos, at, report);
    }
    await addWatches(owner, people);
  } finally {
    decoder.close();
    await database.close();
  }
  return `The demonstration: ${missing.length} reports added.`;
}

/** Positions of the reports that are not there in full: being set back comes last. */
async function findMissing(owner: Knex): Promise<number[]> {
  const rows = await owner('report')
    .join('report_version as v', (join) => join.on('v.report_id', 'report.id')
      .andOn('v.version', owner.raw('1')))
    .whereIn('report.id', demoReports.map((_, at) => demoId('report', at)))
    .whereRaw(`report.filed_at < v.created_at - interval '1 hour'`).select('report.id');
  const done = new Set(rows.map(({ id }) => id));
  return demoReports.flatMap((_, at) => done.has(demoId('report', at)) ? [] : [at]);
}

async function addPeople(owner: Knex, config: Config): Promise<Map<string, string>> {
  const passwords = createPasswords(config.environment);
  const hash = await passwords.hash(accounts[0]?.password ?? '');
  await owner('club').insert(demoClubs.map((club) => ({
    slug: club.slug, name: club.name, time_zone: club.timeZone,
    postal_address: club.postalAddress,
  }))).onConflict('slug').ignore();
  await owner('person').insert(accounts.map((account) => ({
    email: account.email, display_name: account.name, password_hash: hash,
    is_registrar: account.role === 'registrar',
    time_zone: demoClubs.find(({ name }) => name === account.club)?.timeZone ?? 'UTC',
  }))).onConflict('email').ignore();
  const rows = await owner('person').select('id', 'email');
  const people = new Map<string, string>(rows.map(({ id, email }) => [email, id]));
  for (const account of accounts) {
    if (account.role === 'registrar') continue;
    const club = account.club
      ? await owner('club').where({ name: account.club }).first('id') : undefined;
    const roles = account.role === 'subscriber' || account.role === 'member' ? [account.role]
      : ['member', account.role];
    for (const role of roles) {
      await owner.raw(
        `insert into membership (person_id, club_id, role, during)
         select ?, ?, ?, tstzrange(now() - interval '2 years', null)
          where not exists (select from membership where person_id = ?
            and club_id is not distinct from ? and role = ?)`,
        [people.get(account.email) ?? null, club?.id ?? null, role,
          people.get(account.email) ?? null, club?.id ?? null, role]);
    }
  }
  return people;
}

async function addReport(
  parts: Parts, photos: ReturnType<typeof createPhotosService>, at: number, report: DemoReport,
): Promise<void> {
  const { database, config, people } = parts;
  const authorId = people.get(report.author) ?? '';
  const filedAt = new Date(Date.now() - report.daysAgo * dayMilliseconds);
  const pictures = await drawDemoPhotos(report);
  for (const [position, picture] of pictures.entries()) {
    await photos.receive(authorId, demoId('photo', at, position), picture.file);
  }
  const filing = createFilingService(config, () => filedAt);
  const filed = await database.asActor({ kind: 'person', id: authorId },
    (trx) => filing.file(trx, authorId, demoId('report', at),
      contentOf(report, at, filedAt, pictures)));
  await decideAsDemo(parts, filed.number, report);
  if (report.outcome === 'retracted') await retract(parts, demoId('report', at));
  if (report.outcome === 'merged') await merge(parts.owner, demoId('report', at));
  await setBack(parts.owner, demoId('report', at), filedAt);
}

function contentOf(
  report: DemoReport, at: number, filedAt: Date, pictures: readonly DemoPhoto[],
) {
  const maker = demoMakers[report.maker];
  if (!maker) throw new Error(`there is no maker ${report.maker}`);
  const obverse = pictures.findIndex(({ side }) => side === 'obverse');
  const marks = pictures[obverse]?.marks ?? [];
  return {
    club: report.author.endsWith('@saltmarsh.example') ? 'saltmarsh' : 'larkmoor',
    presentedAs: { coinType: report.type, kind: 'coin' as const, metal: null, description: '',
      year: report.year, mintMark: '' },
    components: [{ kind: 'piece' as const,
      judgement: maker.id === 'altered' || maker.id === 'doctored'
        ? 'altered' as const : 'false' as const, note: '' }],
    pieceCount: report.pieceCount,
    condition: 'little_worn' as const,
    whereabouts: report.daysAgo % 3 ? 'kept_for_study' as const : 'with_owner' as const,
    photos: pictures.map((picture, position) => ({
      photoId: demoId('photo', at, position), side: picture.side, circle: picture.circle,
      uprightDegrees: picture.uprightDegrees, caption: picture.caption,
    })),
    tells: maker.tells.map((tell, position) => ({
      tellId: tell.id, note: tell.note, disclosure: 'public' as const,
      pins: notOnAFace.has(tell.id) ? [] : marks
        .slice(position * 2, position * 2 + 2).map((mark, number) => ({
          id: demoId('pin', at, position * 10 + number),
          photoId: demoId('photo', at, obverse), note: '',
          place: { side: 'obverse' as const, clockHours: mark.clockHours,
            radiusFraction: mark.radiusFraction },
        })),
    })),
    measurements: [...report.measurements],
    surfacing: { channel: report.channel,
      surfacedOn: new Date(filedAt.getTime() - 9 * dayMilliseconds).toISOString().slice(0, 10),
      country: report.country, region: report.region, town: report.town, venue: report.venue,
      price: report.price, currency: report.currency },
    account: `<p>${maker.account}</p>`,
    audience: report.audience,
    namedClubs: report.audience === 'named_clubs' ? ['larkmoor', 'ember-vale'] : [],
    embargoUntil: null,
    photoLicence: 'bulletins_and_exports' as const,
    authorNamed: false,
  };
}

/** The desk for taking a report back comes later: its end is written here as the desk will. */
async function retract({ owner, people }: Parts, reportId: string): Promise<void> {
  const version = { report_id: reportId, version: 1, row_version_seen: 3, lease_token: 0,
    reason: 'A member brought a genuine piece with the same pits: they come from its storage.' };
  const voices = [
    { kind: 'retract', email: 'nell.ashgrove@larkmoor.example', slug: 'larkmoor' },
    { kind: 'agree_retract', email: 'hugo.pyke@embervale.example', slug: 'ember-vale' },
  ];
  await owner.transaction(async (trx) => {
    for (const { kind, email, slug } of voices) {
      const club = await trx('club').where({ slug }).first('id');
      await trx('decision').insert({ ...version, kind, moderator_id: people.get(email),
        club_id: club?.id });
    }
    await endPublication(trx, reportId, 'retracted');
    await trx('report').where({ id: reportId }).update({ state: 'retracted' });
  });
}

/** One piece, reported twice: the later number leads to the first find of the year. */
async function merge(owner: Knex, reportId: string): Promise<void> {
  await owner.transaction(async (trx) => {
    await endPublication(trx, reportId, 'merged');
    await trx('report').where({ id: reportId })
      .update({ state: 'merged', merged_into: demoId('report', 0) });
  });
}

async function endPublication(
  trx: Knex.Transaction, reportId: string, endedAs: string,
): Promise<void> {
  await trx('publication').where({ report_id: reportId }).whereRaw('upper_inf(during)').update({
    during: trx.raw(`tstzrange(lower(during),
      greatest(now(), lower(during) + interval '1 microsecond'))`), ended_as: endedAs });
}

/** Moves a report and all that was said of it to the day of the story. */
async function setBack(owner: Knex, reportId: string, filedAt: Date): Promise<void> {
  const back = Date.now() - filedAt.getTime();
  const hours = (count: number): string => new Date(filedAt.getTime()
    + count * 3600 * 1000).toISOString();
  await owner.transaction(async (trx) => {
    const publications = await trx('publication').where({ report_id: reportId })
      .orderByRaw('lower(during)').select('id', 'ended_as');
    for (const [position, { id, ended_as: endedAs }] of publications.entries()) {
      await trx('publication').where({ id }).update({ during: trx.raw(
        'tstzrange(?::timestamptz, ?::timestamptz)',
        [hours(8 + position * 14), endedAs ? hours(22 + position * 14) : null]) });
    }
    const ago = trx.raw(`? * interval '1 millisecond'`, [back]);
    await trx('decision').where({ report_id: reportId })
      .update({ made_at: trx.raw('made_at - ?', [ago]),
        effective_at: trx.raw('effective_at - ?', [ago]) });
    await trx('notice').where({ report_id: reportId })
      .update({ created_at: trx.raw('created_at - ?', [ago]),
        ...(back > 20 * dayMilliseconds ? { read_at: trx.fn.now() } : {}) });
    await trx('registry_event').where({ report_id: reportId })
      .update({ at: trx.raw('at - ?', [ago]) });
    await trx('report').where({ id: reportId }).update({ filed_at: filedAt.toISOString(),
      decided_at: trx.raw('decided_at - ?', [ago]) });
    await trx.raw('select renew_report_search(?)', [reportId]);
    // The mails of a year ago were read a year ago.
    await trx('mail').where({ kind: 'notice' })
      .whereRaw(`parameters ->> 'number' = (select number from report where id = ?)`, [reportId])
      .update({ state: 'dropped', frozen_at: trx.fn.now(), answer: 'of the demonstration',
        message_id: trx.raw(`'<' || id || '@demonstration.example>'`) });
  });
}

async function addWatches(owner: Knex, people: ReadonlyMap<string, string>): Promise<void> {
  const watches = [
    { email: 'wren.halloway@larkmoor.example', name: 'Crowns before 1900', cadence: 'at_once',
      filter: { coinType: ['quillhaven-crown'], yearTo: 1899 } },
    { email: 'pip.sandling@saltmarsh.example', name: 'Gold, daily', cadence: 'daily',
      filter: { metal: ['gold'] } },
    { email: 'sol.verity@reader.example', name: 'Every public report', cadence: 'weekly',
      filter: {} },
  ];
  await owner('watch').insert(watches.map((watch, at) => ({
    id: demoId('watch', at), person_id: people.get(watch.email), name: watch.name,
    filter: JSON.stringify(watch.filter), cadence: watch.cadence,
  }))).onConflict('id').ignore();
}

/** The same id at every run, so that a second one finds what the first one made. */
export function demoId(kind: string, ...numbers: readonly number[]): string {
  const hex = createHash('sha256').update(`demonstration ${kind} ${numbers.join(' ')}`)
    .digest('hex');
  return `${hex.slice(0, 8)}-${hex.slice(8, 12)}-4${hex.slice(13, 16)}-a${hex.slice(17, 20)}-${
    hex.slice(20, 32)}`;
}
