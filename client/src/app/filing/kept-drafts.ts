import { Injectable, inject } from '@angular/core';
import { DraftContent } from '#shared/reports/report-content';

import { SessionStore } from '../auth/session-store';
import { BROWSER_STORAGE } from '../ui/browser-storage';

export interface KeptDraft {
  /** The revision of the draft (row version of a filed report) that was written on. */
  readonly revision: number;
  readonly content: DraftContent;
  /** ISO 8601. */
  readonly keptAt: string;
}

/**
 * What this browser keeps of a report until the server has it: under the person's id, so that
 * nobody else who signs in here is shown it.
 */
@Injectable({ providedIn: 'root' })
export class KeptDrafts {
  private readonly storage = inject(BROWSER_STORAGE);
  private readonly session = inject(SessionStore);

  read(id: string): KeptDraft | null {
    const kept: unknown = this.parsed(this.keyOf(id));
    return isKeptDraft(kept) ? kept : null;
  }

  keep(id: string, draft: KeptDraft): void {
    try {
      this.storage?.setItem(this.keyOf(id), JSON.stringify(draft));
      if (!this.ids().includes(id)) this.keepIds([...this.ids(), id]);
    } catch {
      // A full or forbidden storage is no reason to stop anybody from writing.
    }
  }

  forget(id: string): void {
    try {
      this.storage?.removeItem(this.keyOf(id));
      this.keepIds(this.ids().filter((each) => each !== id));
    } catch {
      // Nothing was kept then.
    }
  }

  /** All that wait here for the server, in the order in which they were begun. */
  all(): readonly (KeptDraft & { readonly id: string })[] {
    return this.ids().flatMap((id) => {
      const kept = this.read(id);
      return kept ? [{ ...kept, id }] : [];
    });
  }

  private ids(): readonly string[] {
    const ids = this.parsed(this.indexKey());
    return Array.isArray(ids) ? ids.filter((id) => typeof id === 'string') : [];
  }

  private keepIds(ids: readonly string[]): void {
    if (ids.length) this.storage?.setItem(this.indexKey(), JSON.stringify(ids));
    else this.storage?.removeItem(this.indexKey());
  }

  private parsed(key: string): unknown {
    try {
      return JSON.parse(this.storage?.getItem(key) ?? 'null');
    } catch {
      return null;
    }
  }

  private indexKey(): string {
    return `touchneedle.drafts.${this.session.person()?.id ?? ''}`;
  }

  private keyOf(id: string): string {
    return `touchneedle.draft.${this.session.person()?.id ?? ''}.${id}`;
  }
}

function isKeptDraft(kept: unknown): kept is KeptDraft {
  return (
    typeof kept === 'object'
    && kept !== null
    && 'revision' in kept
    && typeof kept.revision === 'number'
    && 'content' in kept
    && typeof kept.content === 'object'
    && 'keptAt' in kept
  );
}
