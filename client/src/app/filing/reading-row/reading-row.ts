import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { toObservable, toSignal } from '@angular/core/rxjs-interop';
import { FormControl, FormGroup, ReactiveFormsModule } from '@angular/forms';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { startWith, switchMap } from 'rxjs';
import { Measurement, Quantity } from '#shared/reports/report-content';

import { quantityWords } from '../../ui/measurement-words';

export type Unit = Measurement['unit'];

export interface Instrument {
  /** Its smallest step, in the unit it stands under. */
  readonly step: number;
  readonly words: string;
}

/** Usual instruments by the unit they show. */
export type InstrumentsByUnit = Readonly<Partial<Record<Unit, readonly Instrument[]>>>;

export interface ReadingEntry {
  readonly quantity: Quantity;
  readonly units: readonly Unit[];
  readonly instruments: InstrumentsByUnit;
  readonly row: FormGroup<{
    value: FormControl<string>;
    unit: FormControl<Unit>;
    resolution: FormControl<string>;
  }>;
}

/** One quantity: its reading, the unit, and what it was read with. */
@Component({
  selector: 'tn-reading-row',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatFormFieldModule, MatInput, ReactiveFormsModule],
  templateUrl: './reading-row.html',
  styleUrls: ['../step.scss', './reading-row.scss'],
})
export class ReadingRow {
  readonly entry = input.required<ReadingEntry>();

  protected readonly words = quantityWords;
  private readonly unit = toSignal(
    toObservable(this.entry).pipe(
      switchMap(({ row }) => row.controls.unit.valueChanges.pipe(startWith(row.value.unit))),
    ),
  );
  protected readonly instruments = computed(
    () => this.entry().instruments[this.unit() ?? this.entry().row.controls.unit.value] ?? [],
  );

  /** A step of one unit says nothing in another. */
  protected forgetInstrument(): void {
    this.entry().row.controls.resolution.setValue('');
  }
}
