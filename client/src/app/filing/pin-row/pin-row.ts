import { ChangeDetectionStrategy, Component, computed, input, output } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { PinPlace } from '#shared/reports/report-content';
import { roundEdge, roundFace } from '#shared/tells/coin-coordinates';

import { clockWords } from '../../ui/pin-layer';
import { sideWords } from '../../ui/report-words';

/** One pin by numbers: clock and fraction of the radius, on the edge angle and height. */
@Component({
  selector: 'tn-pin-row',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatButton],
  host: { role: 'group', '[attr.aria-label]': 'words()' },
  template: `
    <span class="tn-meta">{{ sideWords(place().side) }}</span>
    @if (face(); as face) {
      <label>
        <span i18n>clock</span>
        <input
          #clock class="tn-figure" [value]="clockWords(face.clockHours)"
          (change)="moveClock(clock.value)"
        />
      </label>
      <label>
        <span i18n>of the radius</span>
        <input
          #fraction class="tn-figure" type="number" min="0" max="1" step="0.01"
          [value]="face.radiusFraction" (change)="moveRadius(fraction.valueAsNumber)"
        />
      </label>
    }
    @if (edge(); as edge) {
      <label>
        <span i18n>degrees from the top of the obverse</span>
        <input
          #angle class="tn-figure" type="number" min="0" max="360" step="1"
          [value]="edge.angleDegrees" (change)="moveAngle(angle.valueAsNumber)"
        />
      </label>
      <label>
        <span i18n>of the thickness, from the reverse</span>
        <input
          #height class="tn-figure" type="number" min="0" max="1" step="0.05"
          [value]="edge.heightFraction" (change)="moveHeight(height.valueAsNumber)"
        />
      </label>
    }
    <button type="button" matButton (click)="removed.emit()" i18n>Remove pin</button>
  `,
  styleUrl: './pin-row.scss',
})
export class PinRow {
  /** The number of the pin's tell. */
  readonly number = input.required<number>();
  readonly place = input.required<PinPlace>();

  readonly moved = output<PinPlace>();
  readonly removed = output();

  protected readonly clockWords = clockWords;
  protected readonly sideWords = sideWords;
  protected readonly face = computed(() => {
    const place = this.place();
    return place.side === 'edge' ? null : place;
  });
  protected readonly edge = computed(() => {
    const place = this.place();
    return place.side === 'edge' ? place : null;
  });
  protected readonly words = computed(
    () => $localize`Pin ${this.number()}:number: on the ${sideWords(this.place().side)}:side:`,
  );

  /** Takes `3:31` or hours with decimals. */
  protected moveClock(written: string): void {
    const face = this.face();
    const [hours = '', minutes = '0'] = written.trim().replace(',', '.').split(':');
    const clockHours = Number(hours) + Number(minutes) / 60;
    if (!face || hours === '' || Number.isNaN(clockHours)) return;
    this.moved.emit(roundFace({ ...face, clockHours }));
  }

  protected moveRadius(radiusFraction: number): void {
    const face = this.face();
    if (face && !Number.isNaN(radiusFraction)) {
      this.moved.emit(roundFace({ ...face, radiusFraction }));
    }
  }

  protected moveAngle(angleDegrees: number): void {
    const edge = this.edge();
    if (edge && !Number.isNaN(angleDegrees)) this.moved.emit(roundEdge({ ...edge, angleDegrees }));
  }

  protected moveHeight(heightFraction: number): void {
    const edge = this.edge();
    if (edge && !Number.isNaN(heightFraction)) {
      this.moved.emit(roundEdge({ ...edge, heightFraction }));
    }
  }
}
