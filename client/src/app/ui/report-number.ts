import { ChangeDetectionStrategy, Component, input } from '@angular/core';

/**
 * A report's number, never without the words that keep it from passing for a certificate.
 * `stacked` puts the words on a line of their own.
 */
@Component({
  selector: 'tn-report-number',
  changeDetection: ChangeDetectionStrategy.OnPush,
  host: { '[class.stacked]': 'stacked()' },
  template: `<span class="words" i18n>Counterfeit report</span>&ngsp;<b>{{ number() }}</b>`,
  styles: `
    :host {
      display: inline-flex;
      flex-wrap: wrap;
      gap: 0 8px;
      align-items: baseline;
      color: var(--tn-text-muted);
      font-size: 15px;
    }
    :host(.stacked) {
      flex-direction: column;
      align-items: flex-end;
      b {
        color: var(--mat-sys-on-background);
        font-size: 18px;
      }
    }
    b {
      font-family: var(--tn-font-mono);
      font-weight: 400;
      letter-spacing: 0.02em;
      white-space: nowrap;
    }
  `,
})
export class ReportNumber {
  readonly number = input.required<string>();
  readonly stacked = input(false);
}
