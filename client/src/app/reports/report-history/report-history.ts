import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import { ReportView } from '#shared/reports/report-view';

import { audienceWords, confidenceWords } from '../../ui/report-words';
import { WhenPipe } from '../../ui/when-pipe';

/** The publications of a report, the newest first; each version stays to be cited. */
@Component({
  selector: 'tn-report-history',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [RouterLink, WhenPipe],
  template: `
    <h2 id="history-heading" i18n>History</h2>
    <ol class="tn-plain-list" aria-labelledby="history-heading">
      @for (entry of entries(); track entry.from) {
        <li>
          <span>
            <a [routerLink]="['/reports', report().number]"
              [queryParams]="{ version: entry.version }"
              [attr.aria-current]="entry.isShown ? 'page' : null"
              i18n>Version {{ entry.version }}</a>
            · <ng-container i18n>published {{ entry.from | tnWhen }}</ng-container>
          </span>
          <span class="tn-meta">
            {{ entry.confidenceText }} ·
            <ng-container i18n>for {{ entry.audienceText }}</ng-container>
            @if (entry.to) {
              · {{ entry.endText }} {{ entry.to | tnWhen }}
            }
          </span>
        </li>
      }
    </ol>
  `,
  styles: `
    h2 {
      margin-bottom: 12px;
    }
    li {
      display: flex;
      flex-direction: column;
      padding: 10px 0;
    }
    li + li {
      border-top: 1px solid var(--tn-line);
    }
    [aria-current] {
      font-weight: 700;
    }
  `,
})
export class ReportHistory {
  readonly report = input.required<ReportView>();

  protected readonly entries = computed(() =>
    [...this.report().history]
      .sort((one, other) => other.from.localeCompare(one.from))
      .map((entry) => ({
        ...entry,
        confidenceText: confidenceWords(entry.confidence),
        audienceText: audienceWords(entry.audience),
        endText: endWords(entry.endedAs),
        isShown: entry.version === this.report().version && entry.to === null,
      })),
  );
}

function endWords(endedAs: string | null): string {
  switch (endedAs) {
    case 'widened':
      return $localize`opened to more readers`;
    case 'corrected':
      return $localize`corrected by a newer version`;
    case 'confidence_changed':
      return $localize`confidence changed`;
    case 'retracted':
      return $localize`retracted`;
    case 'merged':
      return $localize`merged into another report`;
    case 'withheld':
      return $localize`withheld on legal grounds`;
    default:
      return $localize`ended`;
  }
}
