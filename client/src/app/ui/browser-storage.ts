import { DOCUMENT } from '@angular/common';
import { InjectionToken, inject } from '@angular/core';

export type BrowserStorage = Pick<Storage, 'getItem' | 'setItem' | 'removeItem'>;

/** What this browser keeps between visits; null where there is none or it is forbidden. */
export const BROWSER_STORAGE = new InjectionToken<BrowserStorage | null>('BROWSER_STORAGE', {
  providedIn: 'root',
  factory: () => {
    try {
      return inject(DOCUMENT).defaultView?.localStorage ?? null;
    } catch {
      // Reading the property itself throws where storage is forbidden.
      return null;
    }
  },
});
