import { ChangeDetectionStrategy, Component, input, signal } from '@angular/core';
import { ReportView } from '#shared/reports/report-view';

import { EvidencePhotos } from '../../ui/evidence-photos';
import { TellList } from '../../ui/tell-list';

/** The pictures with the pins on them, and the tells below; one choice lights both. */
@Component({
  selector: 'tn-report-evidence',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [EvidencePhotos, TellList],
  template: `
    <tn-evidence-photos
      [photos]="report().photos"
      [tells]="report().tells"
      [(chosenPin)]="chosenPin"
    />
    <h2 i18n>Tells</h2>
    @if (report().tells.length) {
      <tn-tell-list [tells]="report().tells" [(chosenPin)]="chosenPin" />
    } @else {
      <p class="tn-meta" i18n>No tell is named in what you may see of this report.</p>
    }
    @if (report().someTellsHeldBack) {
      <p class="held-back tn-meta" i18n>
        Some tells are shown to clubs or moderators only: naming them would help to mend a die.
      </p>
    }
  `,
  styles: `
    :host,
    tn-evidence-photos {
      display: block;
    }
    h2 {
      margin: 26px 0 12px;
    }
    .held-back {
      margin-top: 12px;
    }
  `,
})
export class ReportEvidence {
  readonly report = input.required<ReportView>();

  protected readonly chosenPin = signal<string | null>(null);
}
