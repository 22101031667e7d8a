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
import {
  BlurArea,
  Circle,
  PlacedPhoto,
  UploadedPhoto,
  photoAddress,
} from '#shared/reports/photo';

/** Which handle of the circle is moved. */
type Handle = 'centre' | 'radius' | 'upright';

const keyStep = 0.004;

/**
 * The whole photo with what is laid on it: the coin's circle and upright, or the parts to blur.
 * Each can be moved by pointer, by the arrow keys on its handles, and by number fields.
 */
@Component({
  selector: 'tn-photo-frame',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatButton, MatFormFieldModule, MatInput],
  templateUrl: './photo-frame.html',
  styleUrl: './photo-frame.scss',
})
export class PhotoFrame {
  readonly photo = input.required<UploadedPhoto>();
  readonly placed = input.required<PlacedPhoto>();
  readonly mode = input.required<'circle' | 'blur'>();

  readonly placedChange = output<Partial<PlacedPhoto>>();
  readonly blursChange = output<readonly BlurArea[]>();

  private readonly picture = viewChild.required<ElementRef<HTMLElement>>('picture');
  private dragged: Handle | null = null;
  protected readonly drawn = signal<BlurArea | null>(null);

  protected readonly aspect = computed(() => this.photo().height / this.photo().width);
  protected readonly circle = computed(
    (): Circle => this.placed().circle ?? { x: 0.5, y: 0.5, radius: 0.4 },
  );
  protected readonly address = computed(
    // Blurring changes the file behind the address: another address shows the new one.
    () => `${photoAddress(this.photo().id, 'large', 'webp')}?blurs=${this.photo().blurs.length}`,
  );
  protected readonly upright = computed(() => {
    const angle = (this.placed().uprightDegrees * Math.PI) / 180;
    const { x, y, radius } = this.circle();
    return { x: x + radius * Math.sin(angle), y: y - (radius * Math.cos(angle)) / this.aspect() };
  });

  protected startDrag(handle: Handle, event: PointerEvent): void {
    event.preventDefault();
    this.dragged = handle;
    this.picture().nativeElement.setPointerCapture(event.pointerId);
  }

  protected startArea(event: PointerEvent): void {
    if (this.mode() !== 'blur' || event.button !== 0) return;
    event.preventDefault();
    this.picture().nativeElement.setPointerCapture(event.pointerId);
    this.drawn.set({ ...this.spotOf(event), width: 0, height: 0 });
  }

  protected drag(event: PointerEvent): void {
    const spot = this.spotOf(event);
    const area = this.drawn();
    if (area) {
      this.drawn.set({ ...area, width: spot.x - area.x, height: spot.y - area.y });
    } else if (this.dragged) {
      this.moveHandle(this.dragged, spot);
    }
  }

  protected endDrag(): void {
    this.dragged = null;
    const area = this.drawn();
    this.drawn.set(null);
    if (!area || Math.abs(area.width) < 0.01 || Math.abs(area.height) < 0.01) return;
    this.blursChange.emit([
      ...this.photo().blurs,
      {
        x: Math.min(area.x, area.x + area.width),
        y: Math.min(area.y, area.y + area.height),
        width: Math.abs(area.width),
        height: Math.abs(area.height),
      },
    ]);
  }

  protected moveByKey(handle: Handle, event: KeyboardEvent): void {
    const [across, down] =
      {
        ArrowLeft: [-1, 0],
        ArrowRight: [1, 0],
        ArrowUp: [0, -1],
        ArrowDown: [0, 1],
      }[event.key] ?? [];
    if (across === undefined || down === undefined) return;
    event.preventDefault();
    const step = event.shiftKey ? keyStep * 5 : keyStep;
    const { x, y, radius } = this.circle();
    if (handle === 'centre') this.setCircle({ x: x + across * step, y: y + down * step });
    if (handle === 'radius') this.setCircle({ radius: radius + (across - down) * step });
    if (handle === 'upright') this.turn(this.placed().uprightDegrees + (across - down) * 1);
  }

  protected setCircle(change: Partial<Circle>): void {
    const circle = { ...this.circle(), ...change };
    if (Object.values(circle).some((value) => Number.isNaN(value))) return;
    this.placedChange.emit({
      circle: {
        x: clamp(circle.x, 0, 1),
        y: clamp(circle.y, 0, 1),
        radius: clamp(circle.radius, 0.02, 1),
      },
    });
  }

  protected turn(degrees: number): void {
    if (Number.isNaN(degrees)) return;
    const turned = ((Math.round(degrees * 10) / 10) % 360) + 360;
    this.placedChange.emit({ uprightDegrees: turned % 360 });
  }

  protected changeBlur(at: number, change: Partial<BlurArea>): void {
    if (Object.values(change).some((value) => Number.isNaN(value))) return;
    this.blursChange.emit(
      this.photo().blurs.map((area, index) => (index === at ? { ...area, ...change } : area)),
    );
  }

  protected addBlur(): void {
    this.blursChange.emit([...this.photo().blurs, { x: 0.4, y: 0.8, width: 0.2, height: 0.1 }]);
  }

  protected removeBlur(at: number): void {
    this.blursChange.emit(this.photo().blurs.filter((_, index) => index !== at));
  }

  protected percent(fraction: number): number {
    return Math.round(fraction * 1000) / 10;
  }

  private moveHandle(handle: Handle, spot: { x: number; y: number }): void {
    const { x, y } = this.circle();
    const across = spot.x - x;
    const down = (spot.y - y) * this.aspect();
    if (handle === 'centre') this.setCircle(spot);
    if (handle === 'radius') this.setCircle({ radius: Math.hypot(across, down) });
    if (handle === 'upright') this.turn((Math.atan2(across, -down) * 180) / Math.PI);
  }

  private spotOf(event: PointerEvent): { x: number; y: number } {
    const box = this.picture().nativeElement.getBoundingClientRect();
    return {
      x: clamp((event.clientX - box.left) / box.width, 0, 1),
      y: clamp((event.clientY - box.top) / box.height, 0, 1),
    };
  }
}

function clamp(value: number, low: number, high: number): number {
  return Math.min(high, Math.max(low, Math.round(value * 10_000) / 10_000));
}
