import { ChangeDetectionStrategy, Component, LOCALE_ID, computed, inject, input,
  model } from '@angular/core';
import { ReportView } from '#shared/reports/report-view';

import { EvidencePhotos } from '../../ui/evidence-photos';
import { measuredWords, quantityWords } from '../../ui/measurement-words';
import { MoneyPipe } from '../../ui/money-pipe';
import { PlacePipe } from '../../ui/place-pipe';
import { channelWords, componentWords, conditionWords, judgementWords, metalWords, pieceKindWords,
  whereaboutsWords } from '../../ui/report-words';
import { TellList } from '../../ui/tell-list';
import { WhenPipe } from '../../ui/when-pipe';

/** All that was filed, in the order in which it is weighed: photos, tells, figures, story. */
@Component({
  selector: 'tn-evidence',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [EvidencePhotos, MoneyPipe, PlacePipe, TellList, WhenPipe],
  host: { class: 'tn-stack' },
  templateUrl: './evidence.html',
  styleUrl: './evidence.scss',
})
export class Evidence {
  private readonly locale = inject(LOCALE_ID);

  readonly report = input.required<ReportView>();
  readonly chosenPin = model<string | null>(null);

  protected readonly piece = computed(() => {
    const { presentedAs, condition, whereabouts } = this.report();
    return {
      kind: [pieceKindWords(presentedAs.kind),
        ...(presentedAs.metal ? [metalWords(presentedAs.metal)] : [])].join(', '),
      condition: conditionWords(condition),
      whereabouts: whereaboutsWords(whereabouts),
    };
  });
  protected readonly components = computed(() =>
    this.report().components.map(({ kind, judgement, note }) => ({
      kind, words: componentWords(kind), judgement: judgementWords(judgement), note,
    })),
  );
  protected readonly measurements = computed(() =>
    this.report().measurements.map((measurement) => ({
      position: measurement.position,
      words: quantityWords(measurement.quantity),
      value: measuredWords(measurement, this.locale),
      step: measurement.resolution === null ? ''
        : $localize`in steps of ${measurement.resolution}:step: ${measurement.unit}:unit:`,
    })),
  );
  protected readonly channel = computed(() => channelWords(this.report().surfacing.channel));
}
