import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import {
  BlurArea,
  PlacedPhoto,
  UploadedPhoto,
  photoSides,
} from '#shared/reports/photo';
import { FacePlace, Pin } from '#shared/reports/report-content';

import { problemOf } from '../../http/api-failure';
import { problemWords } from '../../http/problem-words';
import { Disc, DiscPhoto } from '../../ui/disc';
import { PlacedPin } from '../../ui/pin-layer';
import { sideWords } from '../../ui/report-words';
import { DraftStore } from '../draft-store';
import { FilingApi, NEW_ID } from '../filing-api';
import { likelyCircle, likelySide, withoutPhoto } from '../filing-content';
import { PhotoFrame } from '../photo-frame/photo-frame';
import { PhotoUploader } from '../photo-uploader/photo-uploader';
import { PinEditor } from '../pin-editor/pin-editor';
import { TellEditor } from '../tell-editor/tell-editor';

/** Photos with what is seen on them: side, circle and upright, blurred parts, tells and pins. */
@Component({
  selector: 'tn-photos-step',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [
    Disc,
    MatFormFieldModule,
    MatInput,
    PhotoFrame,
    PhotoUploader,
    PinEditor,
    TellEditor,
  ],
  templateUrl: './photos-step.html',
  styleUrls: ['../step.scss', './photos-step.scss'],
})
export class PhotosStep {
  private readonly api = inject(FilingApi);
  private readonly newId = inject(NEW_ID);
  protected readonly store = inject(DraftStore);

  /** Sizes and blurs of the photos, which the draft does not hold. */
  private readonly known = signal<ReadonlyMap<string, UploadedPhoto>>(new Map());
  private readonly wanted = signal<string | null>(null);
  protected readonly mode = signal<'pins' | 'circle' | 'blur'>('pins');
  protected readonly chosenTell = signal(0);
  protected readonly chosenPin = signal<string | null>(null);
  protected readonly problem = signal('');
  protected readonly sides = photoSides;
  protected readonly sideWords = sideWords;

  protected readonly thumbs = computed(() =>
    this.store.content().photos.flatMap((placed) => {
      const photo = this.known().get(placed.photoId);
      return photo ? [{ placed, photo, disc: discOf(photo, placed) }] : [];
    }),
  );
  protected readonly chosen = computed(
    () =>
      this.thumbs().find(({ placed }) => placed.photoId === this.wanted()) ?? this.thumbs()[0],
  );
  /** The face that pins go on, or null for edge and details. */
  protected readonly face = computed((): FacePlace['side'] | null => {
    const side = this.chosen()?.placed.side;
    return side === 'obverse' || side === 'reverse' ? side : null;
  });
  protected readonly pins = computed((): readonly PlacedPin[] =>
    this.store.content().tells.flatMap((tell, at) =>
      tell.pins.flatMap((pin) =>
        pin.photoId === this.chosen()?.placed.photoId && pin.place.side !== 'edge'
          ? [
              {
                id: pin.id,
                number: at + 1,
                label: tell.tellId.replaceAll('-', ' '),
                place: pin.place,
              },
            ]
          : [],
      ),
    ),
  );

  constructor() {
    for (const { photoId } of this.store.content().photos) {
      this.api.photo(photoId).subscribe({
        next: (photo) => this.remember(photo),
        error: (error: unknown) => this.problem.set(problemWords(problemOf(error))),
      });
    }
  }

  protected addPhoto(photo: UploadedPhoto): void {
    this.remember(photo);
    const { photos } = this.store.content();
    if (photos.some(({ photoId }) => photoId === photo.id)) return;
    const side = likelySide(photos);
    const circle =
      side === 'obverse' || side === 'reverse' ? likelyCircle(photo.width, photo.height) : null;
    this.store.update({
      photos: [...photos, { photoId: photo.id, side, circle, uprightDegrees: 0, caption: '' }],
    });
    this.wanted.set(photo.id);
  }

  protected choosePhoto(id: string): void {
    this.wanted.set(id);
  }

  protected changePlaced(change: Partial<PlacedPhoto>): void {
    const id = this.chosen()?.placed.photoId;
    this.store.update({
      photos: this.store
        .content()
        .photos.map((placed) => (placed.photoId === id ? { ...placed, ...change } : placed)),
    });
  }

  protected chooseSide(value: string): void {
    const side = photoSides.find((each) => each === value);
    const chosen = this.chosen();
    if (!side || !chosen) return;
    const isFace = side === 'obverse' || side === 'reverse';
    this.changePlaced({
      side,
      circle: isFace
        ? (chosen.placed.circle ?? likelyCircle(chosen.photo.width, chosen.photo.height))
        : null,
    });
    const face = side === 'obverse' || side === 'reverse' ? side : null;
    const tells = this.store.content().tells.map((tell) => ({
      ...tell,
      pins: tell.pins.flatMap((pin): readonly Pin[] => {
        if (pin.photoId !== chosen.placed.photoId) return [pin];
        return face && pin.place.side !== 'edge'
          ? [{ ...pin, place: { ...pin.place, side: face } }]
          : [];
      }),
    }));
    this.store.update({ tells });
  }

  protected movePhoto(by: -1 | 1): void {
    const photos = [...this.store.content().photos];
    const at = photos.findIndex(({ photoId }) => photoId === this.chosen()?.placed.photoId);
    const [moved] = photos.splice(at, 1);
    if (!moved) return;
    photos.splice(Math.max(0, at + by), 0, moved);
    this.store.update({ photos });
  }

  /** Undo brings it back: the file itself stays until it has been unused for a week. */
  protected removePhoto(): void {
    const id = this.chosen()?.placed.photoId;
    if (!id) return;
    const { photos, tells } = this.store.content();
    this.store.update({
      photos: photos.filter(({ photoId }) => photoId !== id),
      tells: withoutPhoto(tells, id),
    });
  }

  protected blurPhoto(blurs: readonly BlurArea[]): void {
    const id = this.chosen()?.placed.photoId;
    if (!id) return;
    this.problem.set('');
    this.api.blurPhoto(id, blurs).subscribe({
      next: (photo) => this.remember(photo),
      error: (error: unknown) => this.problem.set(problemWords(problemOf(error))),
    });
  }

  protected placePin(place: FacePlace): void {
    const photoId = this.chosen()?.placed.photoId;
    const tells = this.store.content().tells;
    if (!photoId) return;
    if (!tells.length) {
      this.problem.set($localize`Name a tell first, then tap the spot where it is seen.`);
      return;
    }
    this.problem.set('');
    const id = this.newId();
    this.store.update({
      tells: tells.map((tell, at) =>
        at === Math.min(this.chosenTell(), tells.length - 1)
          ? { ...tell, pins: [...tell.pins, { id, photoId, note: '', place }] }
          : tell,
      ),
    });
    this.chosenPin.set(id);
  }

  protected movePin({ id, place }: { id: string; place: FacePlace }): void {
    this.store.update({
      tells: this.store.content().tells.map((tell) => ({
        ...tell,
        pins: tell.pins.map((pin) => (pin.id === id ? { ...pin, place } : pin)),
      })),
    });
  }

  protected removePin(id: string): void {
    this.store.update({
      tells: this.store
        .content()
        .tells.map((tell) => ({ ...tell, pins: tell.pins.filter((pin) => pin.id !== id) })),
    });
  }

  private remember(photo: UploadedPhoto): void {
    this.known.update((known) => new Map(known).set(photo.id, photo));
  }
}

function discOf(photo: UploadedPhoto, placed: PlacedPhoto): DiscPhoto {
  return {
    id: photo.id,
    width: photo.width,
    height: photo.height,
    side: placed.side,
    circle: placed.circle,
    uprightDegrees: placed.uprightDegrees,
  };
}
