import { cadences, type Cadence } from '#shared/watches/watch-filter';
import { lastDue } from '#shared/watches/digest-window';
import type { Transaction } from '../db/database';

interface WaitingRow {
  readonly person_id: string;
  readonly address: string;
  readonly time_zone: string;
  readonly cadence: Cadence;
  readonly oldest: Date;
}

const itemsAtMost = 50;
const peopleAtATime = 500;

/**
 * Reserves and freezes the digests that are due at `now`, as the system: one mail a person and
 * window, of every alert that has no mail yet, however late it came. Resolves to how many were
 * made. Planners may run at once: the cause of a window is unique, and an alert goes to one mail.
 */
export async function planDigests(
  trx: Transaction, now: Date, messageIdDomain: string,
): Promise<number> {
  const waiting: WaitingRow[] = await trx('alert')
    .join('watch', 'watch.id', 'alert.watch_id').join('person', 'person.id', 'alert.person_id')
    .select('alert.person_id', 'person.time_zone', 'watch.cadence', 'person.email as address',
      trx.raw('min(alert.made_at) as oldest'))
    .whereNull('alert.mail_id').whereNull('watch.deleted_at').whereNull('person.closed_at')
    .whereRaw('(watch.paused_until is null or watch.paused_until <= now())')
    .groupBy('alert.person_id', 'person.email', 'person.time_zone', 'watch.cadence')
    .orderBy('alert.person_id').limit(peopleAtATime * cadences.length);
  let made = 0;
  for (const [personId, rows] of groupByPerson(waiting)) {
    const due = rows.flatMap((row) => {
      const boundary = lastDue(row.cadence, now, row.time_zone);
      return row.cadence === 'at_once' || row.oldest < boundary
        ? [{ cadence: row.cadence, boundary, address: row.address }] : [];
    });
    if (due.length && await reserveDigest(trx, personId, due, messageIdDomain)) made++;
  }
  return made;
}

async function reserveDigest(trx: Transaction, personId: string, due: readonly {
  cadence: Cadence; boundary: Date; address: string;
}[], messageIdDomain: string): Promise<boolean> {
  const latest = due.reduce((one, other) => other.boundary > one.boundary ? other : one);
  const cause = `digest:${personId}:${latest.boundary.toISOString()}`;
  const [mail] = await trx('mail').insert({
    cause, kind: 'digest', person_id: personId, address: latest.address, state: 'reserved',
    parameters: JSON.stringify({ due: latest.boundary.toISOString() }),
  }).onConflict('cause').ignore().returning('id');
  // The window has its mail: what came late waits for the next one.
  if (!mail) return false;
  // Only what is due counts towards the limit: alerts of a removed or weekly watch, however many,
  // must not keep those of another from ever being reached.
  const { rows } = await trx.raw(
    `with due as (
       select a.id, a.report_id, a.made_at from alert a join watch w on w.id = a.watch_id
         join unnest(?::text[], ?::timestamptz[]) as d (cadence, boundary)
           on d.cadence = w.cadence
        where a.person_id = ? and a.mail_id is null and w.deleted_at is null
          and (w.paused_until is null or w.paused_until <= now())
          and (w.cadence = 'at_once' or a.made_at < d.boundary)),
     chosen as (select report_id from due group by report_id order by min(made_at) limit ?),
     taken as (
       update alert set mail_id = ? where id in (
         select a.id from alert a where a.mail_id is null
            and a.id in (select due.id from due join chosen using (report_id))
          for update of a skip locked)
       returning watch_id, report_id, publication_id, reasons, made_at)
     insert into mail_item (mail_id, report_id, publication_id, position, reasons)
     select ?, t.report_id, (array_agg(t.publication_id order by t.made_at desc))[1],
       row_number() over (order by min(t.made_at), t.report_id),
       jsonb_agg(jsonb_build_object('watchId', t.watch_id, 'watch', w.name,
         'reasons', t.reasons) order by w.created_at)
       from taken t join watch w on w.id = t.watch_id group by t.report_id
     returning report_id`,
    [due.map(({ cadence }) => cadence), due.map(({ boundary }) => boundary), personId,
      itemsAtMost, mail.id, mail.id]);
  if (!rows.length) {
    // Another planner took them between the two statements.
    await trx('mail').where({ id: mail.id }).update({ state: 'dropped', frozen_at: trx.fn.now(),
      message_id: `<${mail.id}@${messageIdDomain}>`, answer: 'nothing was waiting any more' });
    return false;
  }
  await trx('mail').where({ id: mail.id }).update({ state: 'ready', frozen_at: trx.fn.now(),
    message_id: `<${mail.id}@${messageIdDomain}>` });
  return true;
}

function groupByPerson(rows: readonly WaitingRow[]): Map<string, WaitingRow[]> {
  const people = new Map<string, WaitingRow[]>();
  for (const row of rows) {
    const own = people.get(row.person_id) ?? [];
    own.push(row);
    people.set(row.person_id, own);
  }
  return people;
}
