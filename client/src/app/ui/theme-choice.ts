import { DOCUMENT } from '@angular/common';
import { Injectable, inject, signal } from '@angular/core';

import { BROWSER_STORAGE } from './browser-storage';

export type Theme = 'system' | 'light' | 'dark';

// The same key is read before the first paint by client/public/theme-start.js.
const storageKey = 'tn-theme';

/** The reader's choice of light or dark, remembered in this browser; `system` follows it. */
@Injectable({ providedIn: 'root' })
export class ThemeChoice {
  private readonly root = inject(DOCUMENT).documentElement;
  private readonly storage = inject(BROWSER_STORAGE);
  private readonly chosen = signal<Theme>(this.remembered());

  readonly theme = this.chosen.asReadonly();

  constructor() {
    this.show(this.chosen());
  }

  choose(theme: Theme): void {
    this.chosen.set(theme);
    this.show(theme);
    if (theme === 'system') this.storage?.removeItem(storageKey);
    else this.storage?.setItem(storageKey, theme);
  }

  private remembered(): Theme {
    const stored = this.storage?.getItem(storageKey);
    return stored === 'light' || stored === 'dark' ? stored : 'system';
  }

  private show(theme: Theme): void {
    if (theme === 'system') this.root.removeAttribute('data-theme');
    else this.root.setAttribute('data-theme', theme);
  }
}
