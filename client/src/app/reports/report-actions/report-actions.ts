import { Clipboard } from '@angular/cdk/clipboard';
import { DOCUMENT } from '@angular/common';
import {
  ChangeDetectionStrategy, Component, LOCALE_ID, computed, inject, input, signal,
} from '@angular/core';
import { MatButton } from '@angular/material/button';
import { ReportView } from '#shared/reports/report-view';

/** Cite and Print. A citation names the version, so that it stays true after a correction. */
@Component({
  selector: 'tn-report-actions',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatButton],
  template: `
    <button
      matButton="outlined"
      type="button"
      aria-controls="citation"
      [attr.aria-expanded]="citing()"
      (click)="toggleCitation()"
      i18n
    >
      Cite
    </button>
    <button matButton="outlined" type="button" (click)="printPage()" i18n>Print</button>
    <div id="citation" class="tn-card" [hidden]="!citing()">
      <p>{{ citation() }}</p>
      <div class="tn-row">
        <button matButton="outlined" type="button" (click)="copyCitation()" i18n>
          Copy the citation
        </button>
        <span role="status">
          @if (copied()) {
            <ng-container i18n>Copied</ng-container>
          }
        </span>
      </div>
    </div>
  `,
  styles: `
    :host {
      display: flex;
      position: relative;
      gap: 12px;
    }
    .tn-card {
      position: absolute;
      z-index: 5;
      top: calc(100% + 8px);
      right: 0;
      width: min(420px, calc(100vw - 32px));
      box-shadow: var(--mat-sys-level3);
      overflow-wrap: anywhere;
    }
    .tn-card[hidden] {
      display: none;
    }
    @media (max-width: 560px) {
      .tn-card {
        right: auto;
        left: 0;
      }
    }
  `,
})
export class ReportActions {
  private readonly clipboard = inject(Clipboard);
  private readonly document = inject(DOCUMENT);
  private readonly locale = inject(LOCALE_ID);

  readonly report = input.required<ReportView>();

  protected readonly citing = signal(false);
  protected readonly copied = signal(false);
  protected readonly citation = computed(() => {
    const { number, title, version, publishedAt } = this.report();
    const origin = this.document.defaultView?.location.origin ?? '';
    const address = `${origin}/reports/${number}?version=${version}`;
    const day = publishedAt
      ? new Intl.DateTimeFormat(this.locale, { dateStyle: 'long' }).format(new Date(publishedAt))
      : '';
    return $localize`Touchneedle, counterfeit report ${number}:number:, version \
${version}:version:: ${title}:title:. Published ${day}:day:. ${address}:address:`;
  });

  protected toggleCitation(): void {
    this.copied.set(false);
    this.citing.update((citing) => !citing);
  }

  protected copyCitation(): void {
    this.copied.set(this.clipboard.copy(this.citation()));
  }

  protected printPage(): void {
    this.document.defaultView?.print();
  }
}
