import {
  ChangeDetectionStrategy,
  Component,
  ElementRef,
  computed,
  input,
  output,
  signal,
  viewChild,
} from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { BlurArea, UploadedPhoto, photoAddress } from '#shared/reports/photo';

import { bounded, pointIn } from '../circle-handles';
import { blursKey } from '../filing-content';

/** A part smaller than this was a slip of the hand. */
const smallestPart = 0.01;

/** The whole photo with the parts to blur: drawn over it, or given by number fields. */
@Component({
  selector: 'tn-blur-editor',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatButton, MatFormFieldModule, MatInput],
  templateUrl: './blur-editor.html',
  styleUrls: ['../photo-ground.scss', './blur-editor.scss'],
})
export class BlurEditor {
  readonly photo = input.required<UploadedPhoto>();
  /** True while parts may be drawn; otherwise the photo is only shown. */
  readonly drawing = input(false);
  /** True while the server blurs. */
  readonly busy = input(false);

  readonly blursChange = output<readonly BlurArea[]>();

  private readonly ground = viewChild.required<ElementRef<HTMLElement>>('ground');
  protected readonly drawn = signal<BlurArea | null>(null);

  protected readonly address = computed(
    () => `${photoAddress(this.photo().id, 'large', 'webp')}?${blursKey(this.photo())}`,
  );
  protected readonly widest = computed(
    () => `min(100%, calc(72dvh * ${this.photo().width / this.photo().height}))`,
  );
  protected readonly frame = computed(() => {
    const area = this.drawn();
    return area && upright(area);
  });

  protected startArea(event: PointerEvent): void {
    if (!this.drawing() || event.button !== 0) return;
    event.preventDefault();
    const ground = this.ground().nativeElement;
    ground.setPointerCapture(event.pointerId);
    this.drawn.set({ ...pointIn(ground, event), width: 0, height: 0 });
  }

  protected drag(event: PointerEvent): void {
    const area = this.drawn();
    if (!area) return;
    const point = pointIn(this.ground().nativeElement, event);
    this.drawn.set({ ...area, width: point.x - area.x, height: point.y - area.y });
  }

  protected endArea(): void {
    const area = this.frame();
    this.drawn.set(null);
    if (!area || area.width < smallestPart || area.height < smallestPart) return;
    this.blursChange.emit([...this.photo().blurs, bounding(area)]);
  }

  protected changeBlur(at: number, change: Partial<BlurArea>): void {
    if (Object.values(change).some((value) => Number.isNaN(value))) return;
    this.blursChange.emit(
      this.photo().blurs.map((area, index) =>
        index === at ? bounding({ ...area, ...change }) : area,
      ),
    );
  }

  protected addBlur(): void {
    this.blursChange.emit([...this.photo().blurs, { x: 0.4, y: 0.8, width: 0.2, height: 0.1 }]);
  }

  protected removeBlur(at: number): void {
    this.blursChange.emit(this.photo().blurs.filter((_, index) => index !== at));
  }

  protected partWords(at: number): string {
    return $localize`Blurred part ${at + 1}:number:`;
  }

  protected percent(fraction: number): number {
    return Math.round(fraction * 1000) / 10;
  }
}

/** The same part with a width and height that are not negative. */
function upright({ x, y, width, height }: BlurArea): BlurArea {
  return {
    x: Math.min(x, x + width),
    y: Math.min(y, y + height),
    width: Math.abs(width),
    height: Math.abs(height),
  };
}

/** The part cut to the photo. */
function bounding({ x, y, width, height }: BlurArea): BlurArea {
  const left = bounded(x, 0, 1 - smallestPart);
  const top = bounded(y, 0, 1 - smallestPart);
  return {
    x: left,
    y: top,
    width: bounded(width, smallestPart, 1 - left),
    height: bounded(height, smallestPart, 1 - top),
  };
}
