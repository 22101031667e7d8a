import { ChangeDetectionStrategy, Component } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';

/** What a reader gets where there is nothing, or nothing for them: the two look alike. */
@Component({
  selector: 'tn-not-found',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatButton, RouterLink],
  host: { class: 'tn-page' },
  template: `
    <h1 i18n>Nothing here</h1>
    <p class="tn-prose" i18n>
      The address may have a slip in it, or what stood here is not open to you. If you have an
      account, sign in and try again.
    </p>
    <div class="tn-actions">
      <a matButton="filled" routerLink="/reports" i18n>Search the reports</a>
      <a matButton="outlined" routerLink="/" i18n>To the front page</a>
    </div>
  `,
  styles: `
    h1 {
      margin-bottom: 14px;
    }
  `,
})
export class NotFound {}
