import { DOCUMENT } from '@angular/common';
import { DestroyRef, Injectable, inject, signal } from '@angular/core';
import { Subject } from 'rxjs';

import { BROWSER_STORAGE } from '../ui/browser-storage';

const storageKey = 'tn-desk-keys';
const fields = 'input, textarea, select, [contenteditable]';

/**
 * The desk's single keys. They rest while something is typed and while a dialog is open, and can
 * be switched off for good (WCAG 2.1.4), since speech input fires them by accident.
 */
@Injectable()
export class DeskKeys {
  private readonly document = inject(DOCUMENT);
  private readonly storage = inject(BROWSER_STORAGE);
  private readonly switchedOn = signal(this.storage?.getItem(storageKey) !== 'off');

  readonly isOn = this.switchedOn.asReadonly();
  readonly move = new Subject<1 | -1>();
  readonly claim = new Subject<void>();
  readonly decide = new Subject<void>();
  readonly help = new Subject<void>();

  constructor() {
    const listen = (event: KeyboardEvent): void => this.follow(event);
    this.document.addEventListener('keydown', listen);
    inject(DestroyRef).onDestroy(() => this.document.removeEventListener('keydown', listen));
  }

  switch(on: boolean): void {
    this.switchedOn.set(on);
    if (on) this.storage?.removeItem(storageKey);
    else this.storage?.setItem(storageKey, 'off');
  }

  private follow(event: KeyboardEvent): void {
    const { target } = event;
    const typing = target instanceof Element && target.closest(`${fields}, [role='dialog']`);
    if (!this.isOn() || typing || event.ctrlKey || event.metaKey || event.altKey) return;
    if (this.act(event.key)) event.preventDefault();
  }

  private act(key: string): boolean {
    switch (key) {
      case 'j':
        this.move.next(1);
        return true;
      case 'k':
        this.move.next(-1);
        return true;
      case 'c':
        this.claim.next();
        return true;
      case 'd':
        this.decide.next();
        return true;
      case '?':
        this.help.next();
        return true;
      default:
        return false;
    }
  }
}
