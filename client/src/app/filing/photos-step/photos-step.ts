import {
  ChangeDetectionStrategy,
  Component,
  computed,
  inject,
  signal,
  viewChild,
} from '@angular/core';
import { takeUntilDestroyed, toObservable } from '@angular/core/rxjs-interop';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { BlurArea, PlacedPhoto, UploadedPhoto, photoSides } from '#shared/reports/photo';
import { FacePlace } from '#shared/reports/report-content';

import { Disc, DiscPhoto } from '../../ui/disc';
import { Icon } from '../../ui/icon';
import { NEW_ID } from '../../ui/new-id';
import { PlacedPin } from '../../ui/pin-layer';
import { sideWords } from '../../ui/report-words';
import { BlurEditor } from '../blur-editor/blur-editor';
import { CircleFields } from '../circle-fields/circle-fields';
import { DraftStore } from '../draft-store';
import { likelyCircle } from '../filing-content';
import { PhotoShelf } from '../photo-shelf';
import { PhotoUploader } from '../photo-uploader/photo-uploader';
import { PinEditor } from '../pin-editor/pin-editor';
import { withPin, withPinMoved, withSideOfPhoto, withoutPhoto, withoutPin } from '../pins';
import { TellEditor } from '../tell-editor/tell-editor';

/** Photos with what is seen on them: side, circle and upright, blurred parts, tells and pins. */
@Component({
  selector: 'tn-photos-step',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [
    BlurEditor,
    CircleFields,
    Disc,
    Icon,
    MatFormFieldModule,
    MatInput,
    PhotoUploader,
    PinEditor,
    TellEditor,
  ],
  templateUrl: './photos-step.html',
  styleUrls: ['../step.scss', './photos-step.scss'],
})
export class PhotosStep {
  private readonly newId = inject(NEW_ID);
  protected readonly store = inject(DraftStore);
  protected readonly shelf = inject(PhotoShelf);
  private readonly tellEditor = viewChild.required(TellEditor);

  private readonly wanted = signal<string | null>(null);
  protected readonly isBlurring = signal(false);
  protected readonly chosenTell = signal(0);
  protected readonly chosenPin = signal<string | null>(null);
  /** A spot that was tapped before any tell was named. */
  protected readonly pendingSpot = signal<FacePlace | null>(null);
  protected readonly sides = photoSides;
  protected readonly sideWords = sideWords;

  protected readonly thumbs = computed(() =>
    this.store.content().photos.map((placed) => {
      const photo = this.shelf.known().get(placed.photoId);
      return { placed, photo, disc: photo ? discOf(photo, placed) : null };
    }),
  );
  protected readonly chosen = computed(
    () =>
      this.thumbs().find(({ placed }) => placed.photoId === this.wanted()) ?? this.thumbs()[0],
  );
  protected readonly side = computed(() => this.chosen()?.placed.side ?? 'detail');
  /** The face that pins are tapped on, or null for edge and details. */
  protected readonly face = computed((): FacePlace['side'] | null => {
    const side = this.side();
    return side === 'obverse' || side === 'reverse' ? side : null;
  });
  protected readonly pins = computed((): readonly PlacedPin[] =>
    this.store.content().tells.flatMap((tell, at) =>
      tell.pins.flatMap(({ id, photoId, place }) =>
        photoId === this.chosen()?.placed.photoId && place.side !== 'edge'
          ? [{ id, number: at + 1, label: tell.tellId.replaceAll('-', ' '), place }]
          : [],
      ),
    ),
  );

  constructor() {
    this.shelf.fetchPhotos();
    toObservable(this.shelf.newest)
      .pipe(takeUntilDestroyed())
      .subscribe((id) => {
        if (id) this.choosePhoto(id);
      });
  }

  protected choosePhoto(id: string): void {
    this.wanted.set(id);
    this.isBlurring.set(false);
    this.pendingSpot.set(null);
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
    const { photoId, circle } = chosen.placed;
    const likely = chosen.photo && likelyCircle(chosen.photo.width, chosen.photo.height);
    const isFace = side === 'obverse' || side === 'reverse';
    this.store.update({
      photos: this.store.content().photos.map((placed) =>
        placed.photoId === photoId
          ? { ...placed, side, circle: isFace ? (circle ?? likely ?? null) : null }
          : placed,
      ),
      tells: withSideOfPhoto(
        this.store.content().tells,
        photoId,
        side === 'detail' ? null : side,
      ),
    });
  }

  protected movePhoto(by: -1 | 1): void {
    const photos = [...this.store.content().photos];
    const at = photos.findIndex(({ photoId }) => photoId === this.chosen()?.placed.photoId);
    const [moved] = photos.splice(at, 1);
    if (!moved) return;
    photos.splice(Math.max(0, at + by), 0, moved);
    this.wanted.set(moved.photoId);
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
    if (id) this.shelf.blurPhoto(id, blurs);
  }

  /** A tap on the coin: a pin of the chosen tell; with no tell yet, the tell is asked first. */
  protected placePin(place: FacePlace): void {
    const photoId = this.chosen()?.placed.photoId;
    const { tells } = this.store.content();
    if (!photoId) return;
    if (!tells.length) {
      this.pendingSpot.set(place);
      this.tellEditor().focusSearch();
      return;
    }
    const id = this.newId();
    const at = Math.min(this.chosenTell(), tells.length - 1);
    this.store.update({ tells: withPin(tells, at, { id, photoId, note: '', place }) });
    this.chosenPin.set(id);
  }

  protected placePending(): void {
    const spot = this.pendingSpot();
    this.pendingSpot.set(null);
    if (spot) this.placePin(spot);
  }

  protected movePin({ id, place }: { id: string; place: FacePlace }): void {
    this.store.update({ tells: withPinMoved(this.store.content().tells, id, place) });
  }

  protected removePin(id: string): void {
    this.store.update({ tells: withoutPin(this.store.content().tells, id) });
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
