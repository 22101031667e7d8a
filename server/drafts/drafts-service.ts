import { isDeepStrictEqual } from 'node:util';
import type { DraftContent, DraftSave, DraftView } from '#shared/reports/report-content';
import type { Page } from '#shared/paging';
import type { Transaction } from '../db/database';
import { Conflict, NotFound } from '../errors';
import { removeDraft } from './drafts-queries';

/** Drafts shown; somebody with more of them finishes or removes some first. */
const draftsShown = 100;

interface DraftRow {
  readonly id: string;
  readonly revision: number;
  readonly content: DraftContent;
  readonly updated_at: Date;
}

export type DraftsService = ReturnType<typeof createDraftsService>;

export function createDraftsService() {
  return {
    async list(trx: Transaction, authorId: string): Promise<Page<DraftView>> {
      const rows: DraftRow[] = await trx('draft').select('id', 'revision', 'content', 'updated_at')
        .where({ author_id: authorId }).orderBy('updated_at', 'desc').orderBy('id')
        .limit(draftsShown);
      return { items: rows.map(toView), next: null };
    },

    async view(trx: Transaction, authorId: string, id: string): Promise<DraftView> {
      const row = await find(trx, authorId, id);
      if (!row) throw new NotFound();
      return toView(row);
    },

    /**
     * Keeps the draft where it is the one that the author had before them. 409 `stale_version`
     * with the stored `revision` (0: there is none) otherwise, and with the `number` of the
     * report where it has been filed; the text then stays with the author.
     */
    async save(
      trx: Transaction, authorId: string, id: string, { revision, content }: DraftSave,
    ): Promise<DraftView> {
      const row = revision === 0 ? await add(trx, authorId, id, content)
        : await replace(trx, authorId, id, revision, content);
      if (row) return toView(row);
      const stored = await find(trx, authorId, id);
      // The same save again, after its answer got lost.
      if (stored?.revision === revision + 1 && isDeepStrictEqual(stored.content, content)) {
        return toView(stored);
      }
      throw new Conflict('stale_version', { revision: stored?.revision ?? 0,
        ...await numberOf(trx, authorId, id) });
    },

    async remove(trx: Transaction, authorId: string, id: string): Promise<void> {
      await removeDraft(trx, authorId, id);
    },
  };
}

function find(
  trx: Transaction, authorId: string, id: string,
): Promise<DraftRow | undefined> {
  return trx('draft').select('id', 'revision', 'content', 'updated_at')
    .where({ id, author_id: authorId }).first();
}

/** Undefined where there is one already, or the report of that id is filed and not returned. */
async function add(
  trx: Transaction, authorId: string, id: string, content: DraftContent,
): Promise<DraftRow | undefined> {
  const { rows: [row] } = await trx.raw(
    `insert into draft (id, author_id, content)
     select ?::uuid, ?::uuid, ?::jsonb
      where not exists (select from report r where r.id = ? and r.author_id = ?
        and r.state <> 'returned')
     on conflict (id) do nothing returning id, revision, content, updated_at`,
    [id, authorId, JSON.stringify(content), id, authorId]);
  return row;
}

async function replace(
  trx: Transaction, authorId: string, id: string, revision: number, content: DraftContent,
): Promise<DraftRow | undefined> {
  const [row] = await trx('draft').where({ id, author_id: authorId, revision })
    .update({ content: JSON.stringify(content), revision: revision + 1,
      updated_at: trx.fn.now() })
    .returning(['id', 'revision', 'content', 'updated_at']);
  return row;
}

async function numberOf(
  trx: Transaction, authorId: string, id: string,
): Promise<{ number?: string }> {
  const row = await trx('report').select('number').where({ id, author_id: authorId }).first();
  return row ? { number: row.number } : {};
}

function toView(row: DraftRow): DraftView {
  return { id: row.id, revision: row.revision, content: row.content,
    updatedAt: row.updated_at.toISOString() };
}
