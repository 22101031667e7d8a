import { nextDue } from '#shared/watches/digest-window';
import { watchFilterFormat, type WatchFilter, type WatchSave,
  type WatchView } from '#shared/watches/watch-filter';
import type { Transaction } from '../db/database';
import { Conflict, NotFound } from '../errors';

const watchesAtMost = 100;
/** Far enough to mean "until I say otherwise". */
const untilFurtherNotice = '9999-12-31T00:00:00Z';

export interface WatchNeeds {
  /** How many published reports fit the filter now, as the actor. */
  countMatches(trx: Transaction, filter: WatchFilter): Promise<{ count: number; more: boolean }>;
}

export type WatchService = ReturnType<typeof createWatchService>;

export function createWatchService(needs: WatchNeeds) {
  return {
    async list(trx: Transaction, personId: string): Promise<WatchView[]> {
      const rows = await trx('watch').join('person', 'person.id', 'watch.person_id')
        .select('watch.id', 'watch.name', 'watch.filter', 'watch.cadence', 'watch.created_at',
          'watch.paused_until', 'person.time_zone')
        .where({ 'watch.person_id': personId }).whereNull('watch.deleted_at')
        .orderBy(['watch.created_at', 'watch.id']).limit(watchesAtMost);
      return rows.map(toView);
    },

    /** Adds or changes a watch; the id is the client's, so that repeating makes one. */
    async save(
      trx: Transaction, personId: string, id: string, watch: WatchSave,
    ): Promise<WatchView> {
      const others = await trx('watch').count({ count: '*' })
        .where({ person_id: personId }).whereNull('deleted_at').whereNot({ id }).first();
      if (Number(others?.['count']) >= watchesAtMost) {
        throw new Conflict('not_allowed', { maximum: watchesAtMost });
      }
      const values = {
        name: watch.name, filter: JSON.stringify(watch.filter), cadence: watch.cadence,
        filter_format: watchFilterFormat, paused_until: watch.pausedUntil ?? null,
        deleted_at: null,
      };
      const [changed] = await trx('watch').where({ id, person_id: personId }).update(values)
        .returning('id');
      if (!changed) {
        const [added] = await trx('watch').insert({ id, person_id: personId, ...values })
          .onConflict('id').ignore().returning('id');
        if (!added) throw new NotFound();
      }
      const saved = (await this.list(trx, personId)).find((each) => each.id === id);
      if (!saved) throw new NotFound();
      return saved;
    },

    /** Gone for its owner; kept, since mails and alerts refer to it. Safe to repeat. */
    async remove(trx: Transaction, personId: string, id: string): Promise<void> {
      const removed = await trx('watch').where({ id, person_id: personId })
        .update({ deleted_at: trx.raw('coalesce(deleted_at, now())') });
      if (!removed) throw new NotFound();
    },

    preview: (trx: Transaction, filter: WatchFilter) => needs.countMatches(trx, filter),

    /** Every watch rests until its owner wakes it: nothing is deleted by a click in a mail. */
    async pauseAll(trx: Transaction, personId: string): Promise<void> {
      await trx('watch').where({ person_id: personId }).whereNull('deleted_at')
        .update({ paused_until: untilFurtherNotice });
    },

    async describeAll(trx: Transaction, personId: string): Promise<{
      watches: { name: string }[]; stopped: boolean;
    }> {
      const rows = await trx('watch').select('name',
        trx.raw('coalesce(paused_until > now(), false) as paused'))
        .where({ person_id: personId }).whereNull('deleted_at').orderBy('created_at')
        .limit(watchesAtMost);
      return { watches: rows.map(({ name }) => ({ name })),
        stopped: rows.every(({ paused }) => paused) };
    },
  };
}

function toView(row: {
  id: string; name: string; filter: WatchFilter; cadence: WatchView['cadence'];
  created_at: Date; paused_until: Date | null; time_zone: string;
}): WatchView {
  const isPaused = row.paused_until !== null && row.paused_until > new Date();
  return {
    id: row.id, name: row.name, filter: row.filter, cadence: row.cadence,
    createdAt: row.created_at.toISOString(),
    pausedUntil: isPaused ? row.paused_until?.toISOString() ?? null : null,
    nextDigestAt: isPaused || row.cadence === 'at_once' ? null
      : nextDue(row.cadence, new Date(), row.time_zone).toISOString(),
  };
}
