import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { FiledReport } from '#shared/reports/report-content';

import { PageHeader } from '../../ui/page-header';
import { ReportNumber } from '../../ui/report-number';

/** What happens next, after a report was sent. */
@Component({
  selector: 'tn-filed-message',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatButton, PageHeader, ReportNumber, RouterLink],
  template: `
    <tn-page-header i18n-heading heading="Sent for review">
      <tn-report-number [number]="report().number" />
    </tn-page-header>
    <div class="tn-card" role="status">
      @if (changed()) {
        <p i18n>Your changes are filed as a new version. The moderators see what changed.</p>
      } @else {
        <p i18n>Thank you: your report is filed. Quote the number above when you speak of it.</p>
      }
      <p i18n>
        A moderator reads it next; nobody decides on a report of their own. You are told by mail
        and on this site, whatever they decide. Until then you may withdraw it.
      </p>
      <p i18n>Keep the piece as it is. Never sell it on, and never post it without legal advice.</p>
      <div class="tn-actions">
        <a matButton="filled" [routerLink]="['/my/reports', report().number]" i18n
          >Open your report</a
        >
        <a matButton="outlined" routerLink="/file" i18n>File another</a>
      </div>
    </div>
  `,
})
export class FiledMessage {
  readonly report = input.required<FiledReport>();
  /** True where an earlier report was changed. */
  readonly changed = input(false);
}
