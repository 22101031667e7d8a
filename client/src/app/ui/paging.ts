import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { Params, RouterLink } from '@angular/router';

import { Icon } from './icon';

/**
 * Next page of a list cut by key. The key goes into the address (`after`), so that the browser's
 * own "back" is the way to the previous page; "To the start" shows on every page but the first.
 */
@Component({
  selector: 'tn-paging',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Icon, MatButton, RouterLink],
  template: `
    <nav i18n-aria-label aria-label="Pages of the list">
      @if (after()) {
        <a matButton="outlined" [routerLink]="[]" [queryParams]="params(null)"
          queryParamsHandling="merge">
          <tn-icon name="chevron-left" />
          <ng-container i18n>To the start</ng-container>
        </a>
      }
      @if (next(); as key) {
        <a class="next" matButton="outlined" [routerLink]="[]" [queryParams]="params(key)"
          queryParamsHandling="merge">
          <ng-container i18n>Next page</ng-container>
          <tn-icon name="chevron-right" iconPositionEnd />
        </a>
      }
    </nav>
  `,
  styles: `
    nav {
      display: flex;
      justify-content: space-between;
      gap: 12px;
      margin-top: 26px;
    }
    .next {
      margin-left: auto;
    }
  `,
})
export class Paging {
  /** The key of the page on screen; null or empty on the first page. */
  readonly after = input<string | null | undefined>(null);
  /** The key of the page that follows; null on the last. */
  readonly next = input.required<string | null>();

  protected params(after: string | null): Params {
    return { after };
  }
}
