import {
  ChangeDetectionStrategy,
  Component,
  ElementRef,
  computed,
  input,
  model,
  output,
  viewChild,
} from '@angular/core';
import { PlacedPhoto, UploadedPhoto } from '#shared/reports/photo';
import { FacePlace } from '#shared/reports/report-content';
import { photoToFace, roundFace } from '#shared/tells/coin-coordinates';

import { Disc, DiscPhoto } from '../../ui/disc';
import { PlacedPin, spotOf } from '../../ui/pin-layer';

/** The disc itself as a photo in which the coin is upright and fills the square. */
const discView = {
  width: 1,
  height: 1,
  circle: { x: 0.5, y: 0.5, radius: 0.5 },
  uprightDegrees: 0,
};
const minute = 1 / 60;

/**
 * A face as a disc on which pins are placed: a tap on the disc places one for the chosen tell,
 * a pin is dragged, or moved by the arrow keys (round the clock, and towards the rim or centre).
 */
@Component({
  selector: 'tn-pin-editor',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Disc],
  host: { class: 'tn-tray' },
  templateUrl: './pin-editor.html',
  styleUrl: './pin-editor.scss',
})
export class PinEditor {
  readonly photo = input.required<UploadedPhoto>();
  readonly placed = input.required<PlacedPhoto>();
  readonly side = input.required<FacePlace['side']>();
  readonly pins = input.required<readonly PlacedPin[]>();
  readonly chosen = model<string | null>(null);

  /** A spot was tapped where there is no pin. */
  readonly spotChosen = output<FacePlace>();
  readonly pinMoved = output<{ readonly id: string; readonly place: FacePlace }>();
  readonly pinRemoved = output<string>();

  private readonly ground = viewChild.required<ElementRef<HTMLElement>>('ground');
  private dragged: string | null = null;
  private wasDragged = false;

  protected readonly discPhoto = computed(
    (): DiscPhoto => ({
      id: this.photo().id,
      width: this.photo().width,
      height: this.photo().height,
      side: this.placed().side,
      circle: this.placed().circle,
      uprightDegrees: this.placed().uprightDegrees,
    }),
  );
  protected readonly marks = computed(() =>
    this.pins().map((pin) => ({
      ...pin,
      ...spotOf(pin.place),
      // An interpolated aria-label with i18n is set as a property, which no browser reads.
      words: $localize`Pin ${pin.number}:number:, ${pin.label}:tell:: arrow keys move it, \
Delete removes it`,
    })),
  );

  protected placeAt(event: MouseEvent): void {
    if (this.wasDragged) {
      this.wasDragged = false;
      return;
    }
    this.spotChosen.emit(this.coinPlaceOf(event));
  }

  protected startDrag(id: string, event: PointerEvent): void {
    event.stopPropagation();
    this.chosen.set(id);
    this.dragged = id;
    this.ground().nativeElement.setPointerCapture(event.pointerId);
  }

  protected drag(event: PointerEvent): void {
    if (!this.dragged) return;
    this.wasDragged = true;
    this.pinMoved.emit({ id: this.dragged, place: this.coinPlaceOf(event) });
  }

  protected endDrag(): void {
    this.dragged = null;
  }

  protected moveByKey(pin: PlacedPin, event: KeyboardEvent): void {
    const { clockHours, radiusFraction } = pin.place;
    const size = event.shiftKey ? 5 : 1;
    const [turn, out] =
      {
        ArrowRight: [2 * minute, 0],
        ArrowLeft: [-2 * minute, 0],
        ArrowUp: [0, 0.01],
        ArrowDown: [0, -0.01],
      }[event.key] ?? [];
    if (event.key === 'Delete' || event.key === 'Backspace') {
      event.preventDefault();
      this.pinRemoved.emit(pin.id);
    }
    if (turn === undefined || out === undefined) return;
    event.preventDefault();
    this.pinMoved.emit({
      id: pin.id,
      place: roundFace({
        side: pin.place.side,
        clockHours: (clockHours + turn * size + 12) % 12,
        radiusFraction: radiusFraction + out * size,
      }),
    });
  }

  private coinPlaceOf(event: MouseEvent): FacePlace {
    const box = this.ground().nativeElement.getBoundingClientRect();
    const spot = {
      x: (event.clientX - box.left) / box.width,
      y: (event.clientY - box.top) / box.height,
    };
    return photoToFace(spot, this.side(), discView);
  }
}
