import { ChangeDetectionStrategy, Component, computed, input, output } from '@angular/core';
import { FacePlace } from '#shared/reports/report-content';

import { sideWords } from './report-words';

export interface PlacedPin {
  readonly id: string;
  /** The number shown beside the ring; pins of one tell share it. */
  readonly number: number;
  /** The tell's name, spoken with the place. */
  readonly label: string;
  readonly place: FacePlace;
}

/**
 * Pins over an upright disc (as the content of `tn-disc`): brass rings that leave the spot free,
 * the number beside. Each ring is a button in the order of the list; `chosen` marks one.
 */
@Component({
  selector: 'tn-pin-layer',
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './pin-layer.html',
  styleUrl: './pin-layer.scss',
})
export class PinLayer {
  readonly pins = input.required<readonly PlacedPin[]>();
  readonly chosen = input<string | null>(null);

  readonly pinChosen = output<string>();

  protected readonly marks = computed(() =>
    this.pins().map((pin) => {
      const spot = spotOf(pin.place);
      const isChosen = this.chosen() === pin.id;
      return { ...pin, ...spot, isChosen, words: pinWords(pin), leftward: spot.x > 82 };
    }),
  );

  protected choosePin(id: string): void {
    this.pinChosen.emit(id);
  }
}

/** Percent of the disc's square, from its upper left corner. */
export function spotOf(place: FacePlace): { readonly x: number; readonly y: number } {
  const angle = (place.clockHours / 12) * 2 * Math.PI;
  return {
    x: 50 + 50 * place.radiusFraction * Math.sin(angle),
    y: 50 - 50 * place.radiusFraction * Math.cos(angle),
  };
}

/** The clock position as it is said: 12:42, 3:31. Minutes are sixtieths of the hour's arc. */
export function clockWords(clockHours: number): string {
  const total = Math.round(clockHours * 60) % 720;
  const hour = Math.floor(total / 60);
  return `${hour === 0 ? 12 : hour}:${String(total % 60).padStart(2, '0')}`;
}

function pinWords(pin: PlacedPin): string {
  const { side, clockHours, radiusFraction } = pin.place;
  return $localize`${pin.number}:number:: ${pin.label}:tell:, ${sideWords(side)}:side: at \
${clockWords(clockHours)}:clock:, ${radiusFraction.toFixed(2)}:fraction: of the radius`;
}
