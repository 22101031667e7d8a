import { DOCUMENT } from '@angular/common';
import { DestroyRef, Injectable, computed, inject, signal } from '@angular/core';

export type ConnectionState = 'good' | 'slow' | 'unanswered' | 'offline';

/** How the line to the server is, as the interceptors and the browser find it. */
@Injectable({ providedIn: 'root' })
export class Connection {
  private readonly online = signal(true);
  private readonly slowRequests = signal(0);
  private readonly unanswered = signal(false);

  readonly state = computed<ConnectionState>(() => {
    if (!this.online()) return 'offline';
    if (this.unanswered()) return 'unanswered';
    return this.slowRequests() > 0 ? 'slow' : 'good';
  });

  constructor() {
    const view = inject(DOCUMENT).defaultView;
    if (!view) return;
    this.online.set(view.navigator.onLine);
    const goOnline = (): void => this.online.set(true);
    const goOffline = (): void => this.online.set(false);
    view.addEventListener('online', goOnline);
    view.addEventListener('offline', goOffline);
    inject(DestroyRef).onDestroy(() => {
      view.removeEventListener('online', goOnline);
      view.removeEventListener('offline', goOffline);
    });
  }

  /** A request has waited longer than a reader should without a word. */
  noteSlow(): void {
    this.slowRequests.update((count) => count + 1);
  }

  noteSlowEnded(): void {
    this.slowRequests.update((count) => Math.max(0, count - 1));
  }

  noteAnswered(): void {
    this.unanswered.set(false);
  }

  noteUnanswered(): void {
    this.unanswered.set(true);
  }
}
