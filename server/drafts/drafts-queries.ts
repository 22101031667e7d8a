import type { Transaction } from '../db/database';

/** The draft of a report goes when the report is filed. */
export async function removeDraft(
  trx: Transaction, authorId: string, id: string,
): Promise<void> {
  await trx('draft').where({ id, author_id: authorId }).delete();
}
