import { ChangeDetectionStrategy, Component, computed, input, model } from '@angular/core';
import { PinPlace } from '#shared/reports/report-content';
import { ReportTellView } from '#shared/reports/report-view';

import { clockWords } from './pin-layer';
import { disclosureWords, sideWords } from './report-words';

/**
 * The tells of a report in their order, each with its number, what is seen, the reporter's note
 * and the places of its pins. A place is a button that lights its pin on the photo.
 */
@Component({
  selector: 'tn-tell-list',
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './tell-list.html',
  styleUrl: './tell-list.scss',
})
export class TellList {
  readonly tells = input.required<readonly ReportTellView[]>();
  /** Says who may see each tell; for readers who see more than the report's own readers do. */
  readonly withDisclosure = input(false);
  readonly chosenPin = model<string | null>(null);

  protected readonly rows = computed(() =>
    this.tells().map((row) => ({
      ...row,
      disclosed: disclosureWords(row.disclosure),
      pins: row.pins.map((pin) => ({ ...pin, words: placeWords(pin.place) })),
    })),
  );

  protected choosePin(id: string): void {
    this.chosenPin.update((chosen) => (chosen === id ? null : id));
  }
}

/** A pin's place as it is said: "obverse 12:42 · 0.67 r", "edge 100° · 0.50 of the height". */
export function placeWords(place: PinPlace): string {
  if (place.side === 'edge') {
    return $localize`edge ${Math.round(place.angleDegrees)}:degrees:° · \
${place.heightFraction.toFixed(2)}:fraction: of the height`;
  }
  return $localize`${sideWords(place.side)}:side: ${clockWords(place.clockHours)}:clock: · \
${place.radiusFraction.toFixed(2)}:fraction: r`;
}
