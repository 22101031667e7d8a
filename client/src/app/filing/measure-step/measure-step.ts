import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { Measurement, Quantity } from '#shared/reports/report-content';

import { Caution } from '../../ui/caution';
import { DraftStore } from '../draft-store';
import { InstrumentsByUnit, ReadingEntry, ReadingRow, Unit } from '../reading-row/reading-row';

interface Measurable {
  readonly quantity: Quantity;
  readonly instruments: InstrumentsByUnit;
}

const scales: InstrumentsByUnit = {
  g: [
    { step: 1, words: $localize`kitchen scale, 1 g` },
    { step: 0.1, words: $localize`pocket scale, 0.1 g` },
    { step: 0.01, words: $localize`pocket scale, 0.01 g` },
    { step: 0.001, words: $localize`balance, 0.001 g` },
  ],
  gr: [
    { step: 1, words: $localize`scale, 1 gr` },
    { step: 0.1, words: $localize`scale, 0.1 gr` },
  ],
  dwt: [
    { step: 0.1, words: $localize`scale, 0.1 dwt` },
    { step: 0.01, words: $localize`scale, 0.01 dwt` },
  ],
  'oz t': [
    { step: 0.01, words: $localize`scale, 0.01 oz t` },
    { step: 0.001, words: $localize`scale, 0.001 oz t` },
  ],
};
const callipers: InstrumentsByUnit = {
  mm: [
    { step: 1, words: $localize`ruler, 1 mm` },
    { step: 0.1, words: $localize`calliper, 0.1 mm` },
    { step: 0.01, words: $localize`calliper, 0.01 mm` },
  ],
  in: [
    { step: 0.01, words: $localize`calliper, 0.01 in` },
    { step: 0.001, words: $localize`calliper, 0.001 in` },
  ],
};

const measurables: readonly Measurable[] = [
  { quantity: 'weight', instruments: scales },
  { quantity: 'diameter', instruments: callipers },
  { quantity: 'thickness', instruments: callipers },
  { quantity: 'weight_in_water', instruments: scales },
  {
    quantity: 'water_temperature',
    instruments: { '°C': [{ step: 1, words: $localize`thermometer, 1 °C` }] },
  },
  { quantity: 'die_axis', instruments: { '°': [{ step: 10, words: $localize`by eye, 10°` }] } },
  {
    quantity: 'lowest_tone',
    instruments: { Hz: [{ step: 10, words: $localize`recording, 10 Hz` }] },
  },
];

/** Weight and diameter are what a member has at hand; the others are folded away. */
const usualCount = 2;
const reading = /^\d+([.,]\d+)?$/;

/** What scale, calliper and magnet say; each is offered, none demanded. */
@Component({
  selector: 'tn-measure-step',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Caution, MatFormFieldModule, MatInput, ReactiveFormsModule, ReadingRow],
  templateUrl: './measure-step.html',
  styleUrl: '../step.scss',
})
export class MeasureStep {
  private readonly store = inject(DraftStore);
  private readonly builder = inject(NonNullableFormBuilder);

  private readonly entries = measurables.map((measurable): ReadingEntry => ({
    ...measurable,
    units: Object.keys(measurable.instruments) as Unit[],
    row: this.rowOf(measurable),
  }));
  protected readonly usual = this.entries.slice(0, usualCount);
  protected readonly rare = this.entries.slice(usualCount);
  /** Open where something is given there already. */
  protected readonly opensRare = this.rare.some(({ row }) => row.controls.value.value !== '');
  protected readonly magnetic = this.builder.control(this.magneticAtStart());
  private readonly form = this.builder.group({
    rows: this.builder.array(this.entries.map(({ row }) => row)),
    magnetic: this.magnetic,
  });

  constructor() {
    this.form.valueChanges.pipe(takeUntilDestroyed()).subscribe(() => this.takeAnswers());
  }

  private rowOf({ quantity, instruments }: Measurable): ReadingEntry['row'] {
    const given = this.store
      .content()
      .measurements.find((measurement) => measurement.quantity === quantity);
    const unit = given?.unit ?? (Object.keys(instruments)[0] as Unit | undefined) ?? 'g';
    const isUsual = (instruments[unit] ?? []).some(({ step }) => step === given?.resolution);
    return this.builder.group({
      value: this.builder.control(given ? String(given.value) : '', Validators.pattern(reading)),
      unit: this.builder.control<Unit>(unit),
      resolution: this.builder.control(isUsual ? String(given?.resolution) : ''),
    });
  }

  private magneticAtStart(): string {
    const given = this.store
      .content()
      .measurements.find((measurement) => measurement.quantity === 'magnetic');
    return given ? String(given.value) : '';
  }

  private takeAnswers(): void {
    const measured = this.entries.flatMap(({ quantity, row }): Measurement[] => {
      const { value, unit, resolution } = row.getRawValue();
      if (!reading.test(value)) return [];
      const written = value.replace(',', '.');
      return [
        {
          quantity,
          unit,
          value: Number(written),
          // Nothing chosen: the last place written, as a scale shows all it can.
          resolution: Number(resolution) || lastPlaceOf(written),
        },
      ];
    });
    const magnetic = this.magnetic.value;
    this.store.update({
      measurements: magnetic
        ? [
            ...measured,
            { quantity: 'magnetic', value: Number(magnetic), unit: '1', resolution: null },
          ]
        : measured,
    });
  }
}

/** 24.90 gives 0.01, 25 gives 1. */
function lastPlaceOf(written: string): number {
  return Number(`1e-${written.split('.')[1]?.length ?? 0}`);
}
