import {
  ChangeDetectionStrategy, Component, LOCALE_ID, computed, inject, input,
} from '@angular/core';
import { RouterLink } from '@angular/router';
import { CoinTypeView } from '#shared/catalogue/coin-type-view';
import { MeasurementView, ReportView } from '#shared/reports/report-view';

import { AnswerChip } from '../../ui/answer-chip';
import { Confidence } from '../../ui/confidence';
import { DeviationBar } from '../../ui/deviation-bar';
import { measuredWords, quantityWords } from '../../ui/measurement-words';
import { MoneyPipe } from '../../ui/money-pipe';
import { PlacePipe } from '../../ui/place-pipe';
import {
  audienceWords, basisWords, channelWords, componentWords, conditionWords, judgementWords,
  stateWords, whereaboutsWords,
} from '../../ui/report-words';
import { WhenPipe } from '../../ui/when-pipe';
import { compareWithStandard } from '../against-standard';

/** What is known of the piece beside its pictures: how sure, measured, surfaced, its parts. */
@Component({
  selector: 'tn-report-particulars',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [AnswerChip, Confidence, DeviationBar, MoneyPipe, PlacePipe, RouterLink, WhenPipe],
  host: { class: 'tn-stack' },
  templateUrl: './report-particulars.html',
  styleUrl: './report-particulars.scss',
})
export class ReportParticulars {
  private readonly locale = inject(LOCALE_ID);

  readonly report = input.required<ReportView>();
  /** The standard the piece is held against; null where there is none or it is not loaded. */
  readonly coinType = input<CoinTypeView | null>(null);

  protected readonly state = computed(() => stateWords(this.report().state));
  protected readonly basis = computed(() => this.report().basis.map(basisWords));
  protected readonly basisText = computed(() =>
    new Intl.ListFormat(this.locale, { type: 'conjunction' }).format(this.basis()),
  );
  protected readonly wasInHand = computed(() => this.report().basis.includes('piece_in_hand'));
  protected readonly measured = computed(() =>
    this.report().measurements.map((measurement) => this.measurementRow(measurement)),
  );
  protected readonly hasComparison = computed(() =>
    this.measured().some(({ comparison }) => comparison),
  );
  protected readonly channel = computed(() => channelWords(this.report().surfacing.channel));
  protected readonly condition = computed(() => conditionWords(this.report().condition));
  protected readonly whereabouts = computed(() => whereaboutsWords(this.report().whereabouts));
  protected readonly audience = computed(() => {
    const { audience } = this.report();
    return audience && audienceWords(audience);
  });
  protected readonly components = computed(() =>
    this.report().components.map((component) => ({
      ...component,
      name: componentWords(component.kind),
      judgementText: judgementWords(component.judgement),
    })),
  );

  private measurementRow(measurement: MeasurementView) {
    const { position, quantity, unit, resolution } = measurement;
    const type = this.coinType();
    const comparison =
      type === null ? undefined : compareWithStandard(measurement, type, this.report().condition);
    return {
      position,
      name: quantityWords(quantity),
      figure: measuredWords(measurement, this.locale),
      step: resolution === null ? null : `${this.figure(resolution)} ${unit}`,
      comparison,
      limits: comparison && `${this.figure(comparison.low)}–${this.figure(comparison.high)} \
${comparison.unit}`,
    };
  }

  private figure(value: number): string {
    return value.toLocaleString(this.locale, { maximumFractionDigits: 4 });
  }
}
