import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { Measurement, Quantity } from '#shared/reports/report-content';

import { Caution } from '../../ui/caution';
import { quantityWords } from '../../ui/measurement-words';
import { DraftStore } from '../draft-store';

interface Measurable {
  readonly quantity: Quantity;
  readonly units: readonly Measurement['unit'][];
  /** Usual instruments by their smallest step, in the first unit. */
  readonly instruments: readonly { readonly step: number; readonly words: string }[];
}

const measurables: readonly Measurable[] = [
  {
    quantity: 'weight',
    units: ['g', 'gr', 'dwt', 'oz t'],
    instruments: [
      { step: 1, words: $localize`kitchen scale, 1 g` },
      { step: 0.1, words: $localize`pocket scale, 0.1 g` },
      { step: 0.01, words: $localize`pocket scale, 0.01 g` },
    ],
  },
  {
    quantity: 'diameter',
    units: ['mm', 'in'],
    instruments: [
      { step: 1, words: $localize`ruler, 1 mm` },
      { step: 0.1, words: $localize`calliper, 0.1 mm` },
      { step: 0.01, words: $localize`calliper, 0.01 mm` },
    ],
  },
  {
    quantity: 'thickness',
    units: ['mm', 'in'],
    instruments: [
      { step: 0.1, words: $localize`calliper, 0.1 mm` },
      { step: 0.01, words: $localize`calliper, 0.01 mm` },
    ],
  },
  {
    quantity: 'weight_in_water',
    units: ['g', 'gr'],
    instruments: [
      { step: 0.1, words: $localize`pocket scale, 0.1 g` },
      { step: 0.01, words: $localize`pocket scale, 0.01 g` },
    ],
  },
  {
    quantity: 'water_temperature',
    units: ['°C'],
    instruments: [{ step: 1, words: $localize`thermometer, 1 °C` }],
  },
  {
    quantity: 'die_axis',
    units: ['°'],
    instruments: [{ step: 10, words: $localize`by eye, 10°` }],
  },
  {
    quantity: 'lowest_tone',
    units: ['Hz'],
    instruments: [{ step: 10, words: $localize`recording, 10 Hz` }],
  },
];

/** What scale, calliper and magnet say; each is offered, none demanded. */
@Component({
  selector: 'tn-measure-step',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Caution, MatFormFieldModule, MatInput, ReactiveFormsModule],
  templateUrl: './measure-step.html',
  styleUrl: '../step.scss',
})
export class MeasureStep {
  private readonly store = inject(DraftStore);
  private readonly builder = inject(NonNullableFormBuilder);

  protected readonly words = quantityWords;
  protected readonly entries = measurables.map((measurable) => ({
    ...measurable,
    row: this.rowOf(measurable),
  }));
  private readonly rows = this.entries.map(({ row }) => row);
  protected readonly magnetic = this.builder.control(this.magneticAtStart());
  private readonly form = this.builder.group({
    rows: this.builder.array(this.rows),
    magnetic: this.magnetic,
  });

  constructor() {
    this.form.valueChanges.pipe(takeUntilDestroyed()).subscribe(() => this.takeAnswers());
  }

  private rowOf({ quantity, units, instruments }: Measurable) {
    const given = this.store
      .content()
      .measurements.find((measurement) => measurement.quantity === quantity);
    return this.builder.group({
      quantity: this.builder.control(quantity),
      value: this.builder.control(given ? String(given.value) : '', [
        Validators.pattern(/^\d+([.,]\d+)?$/),
      ]),
      unit: this.builder.control<Measurement['unit']>(given?.unit ?? units[0] ?? 'g'),
      resolution: this.builder.control(
        String(given?.resolution ?? instruments.at(-1)?.step ?? ''),
      ),
    });
  }

  private magneticAtStart(): string {
    const given = this.store
      .content()
      .measurements.find((measurement) => measurement.quantity === 'magnetic');
    return given ? String(given.value) : '';
  }

  private takeAnswers(): void {
    const measured = this.rows.flatMap((row): Measurement[] => {
      const { quantity, value, unit, resolution } = row.getRawValue();
      if (!/^\d+([.,]\d+)?$/.test(value)) return [];
      return [
        {
          quantity,
          unit,
          value: Number(value.replace(',', '.')),
          resolution: Number(resolution) || null,
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
