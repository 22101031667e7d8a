import { ChangeDetectionStrategy, Component, computed, input, signal } from '@angular/core';
import { PlacedPhotoView } from '#shared/reports/photo';
import { FacePlace, Pin } from '#shared/reports/report-content';
import { ReportTellView, ReportView } from '#shared/reports/report-view';

import { Disc } from '../../ui/disc';
import { PinLayer, PlacedPin, clockWords } from '../../ui/pin-layer';
import { sideWords } from '../../ui/report-words';

interface FacePhoto {
  readonly photo: PlacedPhotoView;
  readonly side: string;
  readonly pins: readonly PlacedPin[];
}

/**
 * The pictures with the pins on them, and the tells beside. A tell chosen in the list marks its
 * pins, a pin chosen on a picture its tell.
 */
@Component({
  selector: 'tn-report-evidence',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Disc, PinLayer],
  templateUrl: './report-evidence.html',
  styleUrl: './report-evidence.scss',
})
export class ReportEvidence {
  private readonly chosenPosition = signal<number | null>(null);

  readonly report = input.required<ReportView>();

  protected readonly chosen = this.chosenPosition.asReadonly();
  /** The first obverse and the first reverse, side by side. */
  protected readonly faces = computed<readonly FacePhoto[]>(() => {
    const { photos } = this.report();
    return (['obverse', 'reverse'] as const).flatMap((side) => {
      const photo = photos.find((each) => each.side === side);
      return photo ? [this.facePhoto(photo)] : [];
    });
  });
  protected readonly others = computed(() => {
    const shown = this.faces().map(({ photo }) => photo.id);
    return this.report().photos.filter(({ id }) => !shown.includes(id))
      .map((photo) => this.facePhoto(photo));
  });
  protected readonly tells = computed(() =>
    this.report().tells.map((tell) => ({
      ...tell,
      places: tell.pins.map((pin) => ({ id: pin.id, words: placeWords(pin), note: pin.note })),
      isChosen: tell.position === this.chosenPosition(),
    })),
  );

  protected chooseTell(position: number): void {
    this.chosenPosition.update((before) => (before === position ? null : position));
  }

  protected choosePin(pinId: string): void {
    const tell = this.report().tells.find(({ pins }) => pins.some(({ id }) => id === pinId));
    if (tell) this.chooseTell(tell.position);
  }


  private facePhoto(photo: PlacedPhotoView): FacePhoto {
    return {
      photo,
      side: sideWords(photo.side),
      pins: photo.circle
        ? this.report().tells.flatMap((tell) => pinsOn(photo, tell))
        : [],
    };
  }
}

function pinsOn(photo: PlacedPhotoView, tell: ReportTellView): readonly PlacedPin[] {
  return tell.pins.flatMap((pin) =>
    pin.photoId === photo.id && isOnFace(pin.place)
      ? [{ id: pin.id, number: tell.position, label: tell.tell.name, place: pin.place }]
      : [],
  );
}

function isOnFace(place: Pin['place']): place is FacePlace {
  return place.side !== 'edge';
}

/** "obverse 12:42 · 0.67 r", or for the edge "edge 118° · 0.40 of its height". */
function placeWords({ place }: Pin): string {
  if (place.side === 'edge') {
    return $localize`edge ${Math.round(place.angleDegrees)}:degrees:° · \
${place.heightFraction.toFixed(2)}:fraction: of its height`;
  }
  return $localize`${sideWords(place.side)}:side: ${clockWords(place.clockHours)}:clock: · \
${place.radiusFraction.toFixed(2)}:fraction: r`;
}
