import { ChangeDetectionStrategy, Component, computed, input, model } from '@angular/core';
import { PlacedPhotoView } from '#shared/reports/photo';
import { ReportTellView } from '#shared/reports/report-view';

import { Disc } from './disc';
import { PinLayer, PlacedPin } from './pin-layer';
import { sideWords } from './report-words';

/**
 * All photos of a report on stone: the faces as discs side by side with their pins, edge and
 * details below. `chosenPin` is shared with a list of the tells, so that one lights the other.
 */
@Component({
  selector: 'tn-evidence-photos',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Disc, PinLayer],
  host: { class: 'tn-tray' },
  templateUrl: './evidence-photos.html',
  styleUrl: './evidence-photos.scss',
})
export class EvidencePhotos {
  readonly photos = input.required<readonly PlacedPhotoView[]>();
  readonly tells = input.required<readonly ReportTellView[]>();
  readonly chosenPin = model<string | null>(null);

  protected readonly faces = computed(() => this.photos().filter(isFace).map(this.withPins));
  protected readonly others = computed(() =>
    this.photos().filter((photo) => !isFace(photo)).map(this.withPins),
  );

  private readonly withPins = (photo: PlacedPhotoView) => ({
    photo,
    side: sideWords(photo.side),
    pins: pinsOfPhoto(this.tells(), photo.id),
  });
}

function isFace(photo: PlacedPhotoView): boolean {
  return photo.side === 'obverse' || photo.side === 'reverse';
}

/** The face pins on one photo, numbered as the tells are listed, from 1. */
export function pinsOfPhoto(tells: readonly ReportTellView[], photoId: string): PlacedPin[] {
  return tells.flatMap(({ tell, pins }, index) =>
    pins.flatMap(({ id, photoId: pinned, place }) =>
      pinned === photoId && place.side !== 'edge'
        ? { id, number: index + 1, label: tell.name, place }
        : [],
    ),
  );
}
