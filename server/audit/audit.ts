import type { Transaction } from '../db/database';

export interface AuditEntry {
  /** What was done, such as `report_filed` or `role_granted`. */
  readonly act: string;
  readonly actorId: string | null;
  readonly clubId?: string | null;
  readonly subjectKind: string;
  readonly subjectId: string;
  /** No personal data: ids and hashes only, so that the chain never has to be broken. */
  readonly details?: Readonly<Record<string, unknown>>;
}

/** Adds an entry to the append-only audit log; it joins the hash chain when `trx` commits. */
export async function recordAudit(trx: Transaction, entry: AuditEntry): Promise<void> {
  await trx('audit_entry').insert({
    act: entry.act,
    actor_id: entry.actorId,
    club_id: entry.clubId ?? null,
    subject_kind: entry.subjectKind,
    subject_id: entry.subjectId,
    details: JSON.stringify(entry.details ?? {}),
  });
}
