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
import { PlacedPhoto, UploadedPhoto, photoAddress } from '#shared/reports/photo';
import { FacePlace } from '#shared/reports/report-content';
import { faceToPhoto, photoToFace } from '#shared/tells/coin-coordinates';

import { PlacedPin } from '../../ui/pin-layer';
import { Framing, Handle, arrowOf, draggedTo, faceView, handlePoints, movedByKey,
  pointIn } from '../circle-handles';
import { blursKey, likelyCircle } from '../filing-content';

/** CSS pixels that a finger may slip and still tap. */
const slip = 8;
/** What an arrow key moves a pin by, in radii of the coin; with the shift key five times that. */
const pinStep = 0.01;

/**
 * The whole photo of a face with the coin's circle and the pins on it. A tap on the coin chooses
 * a spot; pins and the handles of the circle are dragged, or moved by the arrow keys.
 */
@Component({
  selector: 'tn-pin-editor',
  changeDetection: ChangeDetectionStrategy.OnPush,
  host: { class: 'tn-tray' },
  templateUrl: './pin-editor.html',
  styleUrls: ['../photo-ground.scss', './pin-editor.scss'],
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
  /** Circle or upright were changed. */
  readonly framed = output<Partial<Framing>>();
  readonly gestureBegun = output();
  readonly gestureEnded = output();

  private readonly ground = viewChild.required<ElementRef<HTMLElement>>('ground');
  private dragged: { readonly pin: string } | { readonly handle: Handle } | null = null;
  private pressedAt: { readonly x: number; readonly y: number } | null = null;

  protected readonly address = computed(
    () => `${photoAddress(this.photo().id, 'large', 'webp')}?${blursKey(this.photo())}`,
  );
  protected readonly view = computed(() =>
    faceView(
      this.photo(),
      this.placed(),
      this.placed().circle ?? likelyCircle(this.photo().width, this.photo().height),
    ),
  );
  /** The photo is never higher than the window, so that it can be seen whole. */
  protected readonly widest = computed(
    () => `min(100%, calc(72dvh * ${this.photo().width / this.photo().height}))`,
  );
  protected readonly ellipse = computed(() => {
    const { circle, width, height } = this.view();
    return { ...circle, down: (circle.radius * width) / height };
  });
  protected readonly handles = computed(() => {
    const points = handlePoints(this.view());
    return (['upright', 'radius', 'centre'] as const).map((handle) => ({
      handle,
      ...points[handle],
      words: handleWords(handle),
    }));
  });
  protected readonly marks = computed(() =>
    this.pins().map((pin) => {
      const point = faceToPhoto(pin.place, this.view());
      // An interpolated aria-label with i18n is set as a property, which no browser reads.
      const words = $localize`Pin ${pin.number}:number:, ${pin.label}:tell:: arrow keys move it, \
Delete removes it`;
      return { ...pin, ...point, words, leftward: point.x > 0.86 };
    }),
  );

  protected press(event: PointerEvent): void {
    if (event.button === 0) this.pressedAt = { x: event.clientX, y: event.clientY };
  }

  protected startPin(id: string, event: PointerEvent): void {
    this.chosen.set(id);
    this.start({ pin: id }, event);
  }

  protected startHandle(handle: Handle, event: PointerEvent): void {
    this.start({ handle }, event);
  }

  protected drag(event: PointerEvent): void {
    const { dragged } = this;
    if (!dragged) return;
    const point = pointIn(this.ground().nativeElement, event);
    if ('pin' in dragged) {
      const place = photoToFace(point, this.side(), this.view());
      this.pinMoved.emit({ id: dragged.pin, place });
    } else {
      this.framed.emit(draggedTo(dragged.handle, point, this.view()));
    }
  }

  protected release(event: PointerEvent): void {
    const { pressedAt, dragged } = this;
    this.endDrag();
    if (dragged || !pressedAt) return;
    if (Math.hypot(event.clientX - pressedAt.x, event.clientY - pressedAt.y) > slip) return;
    const point = pointIn(this.ground().nativeElement, event);
    this.spotChosen.emit(photoToFace(point, this.side(), this.view()));
  }

  protected endDrag(): void {
    if (this.dragged) this.gestureEnded.emit();
    this.dragged = null;
    this.pressedAt = null;
  }

  protected movePinByKey(pin: PlacedPin, event: KeyboardEvent): void {
    if (event.key === 'Delete' || event.key === 'Backspace') {
      event.preventDefault();
      this.pinRemoved.emit(pin.id);
      return;
    }
    const arrow = arrowOf(event.key);
    if (!arrow) return;
    event.preventDefault();
    const view = this.view();
    const step = pinStep * (event.shiftKey ? 5 : 1) * view.circle.radius;
    const { x, y } = faceToPhoto(pin.place, view);
    const moved = {
      x: x + arrow[0] * step,
      y: y + (arrow[1] * step * view.width) / view.height,
    };
    this.pinMoved.emit({ id: pin.id, place: photoToFace(moved, this.side(), view) });
  }

  protected moveHandleByKey(handle: Handle, event: KeyboardEvent): void {
    const arrow = arrowOf(event.key);
    if (!arrow) return;
    event.preventDefault();
    this.framed.emit(movedByKey(handle, arrow, event.shiftKey ? 5 : 1, this.view()));
  }

  private start(dragged: NonNullable<PinEditor['dragged']>, event: PointerEvent): void {
    event.stopPropagation();
    if (event.button !== 0) return;
    this.dragged = dragged;
    this.gestureBegun.emit();
    this.ground().nativeElement.setPointerCapture(event.pointerId);
  }
}

function handleWords(handle: Handle): string {
  switch (handle) {
    case 'centre':
      return $localize`Centre of the coin: arrow keys move it`;
    case 'radius':
      return $localize`Rim of the coin: arrow keys make the circle larger or smaller`;
    case 'upright':
      return $localize`Top of the coin: arrow keys turn it`;
  }
}
