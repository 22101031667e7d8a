import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import {
  PlacedPhotoView,
  RenditionSize,
  photoAddress,
  renditionSizes,
} from '#shared/reports/photo';

import { Icon } from './icon';
import { PhotoViewer } from './photo-viewer';
import { sideWords } from './report-words';

export type DiscPhoto = Omit<PlacedPhotoView, 'caption'>;

/**
 * A coin photo cut to its circle and turned upright, to be laid on stone (`tn-tray`). A photo
 * without a circle (edge, detail, bar) is shown whole in the square. Fills the width it is given.
 * With `whole`, the uncropped picture is one tap away; inside a link or button leave it off.
 * Content is laid over the disc in its coordinates: a pin layer.
 */
@Component({
  selector: 'tn-disc',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Icon],
  templateUrl: './disc.html',
  styleUrl: './disc.scss',
})
export class Disc {
  private readonly viewer = inject(PhotoViewer);

  readonly photo = input.required<DiscPhoto>();
  /** What the picture shows, for readers who don't see it; the side where none is given. */
  readonly alt = input('');
  /** CSS pixels the disc takes at most; picks the rendition that is fetched. */
  readonly displayWidth = input(160);
  readonly whole = input(false);
  /** Shown in the whole picture's window. */
  readonly caption = input('');
  /** Pictures at the top of a page should not wait for the scroll. */
  readonly eager = input(false);

  protected readonly circle = computed(() => this.photo().circle);
  protected readonly sourceSet = computed(() => {
    const sizes = Object.entries(renditionSizes) as [RenditionSize, number][];
    return sizes
      .map(([size, width]) => `${photoAddress(this.photo().id, size, 'webp')} ${width}w`)
      .join(', ');
  });
  protected readonly fallback = computed(() => photoAddress(this.photo().id, 'medium', 'jpeg'));
  protected readonly text = computed(
    () => this.alt() || $localize`${sideWords(this.photo().side)}:side: of the reported piece`,
  );
  protected readonly frame = computed(() => discFrame(this.photo()));
  protected readonly fetchedWidth = computed(
    () => `${Math.ceil((this.displayWidth() * this.frame().widthPercent) / 100)}px`,
  );

  protected showWholePicture(): void {
    void this.viewer.open(this.photo(), this.text(), this.caption());
  }
}

/** Where the photo lies behind the disc: percentages of the disc, origin of the turn in its own. */
export interface DiscFrame {
  readonly widthPercent: number;
  readonly leftPercent: number;
  readonly topPercent: number;
  readonly origin: string;
  readonly turn: string;
}

/** The photo scaled and moved so that the coin's circle fills a square of 100 % by 100 %. */
export function discFrame(photo: DiscPhoto): DiscFrame {
  const { circle, width, height, uprightDegrees } = photo;
  const turn = `rotate(${-uprightDegrees}deg)`;
  if (!circle) {
    return { widthPercent: 100, leftPercent: 0, topPercent: 0, origin: '50% 50%', turn };
  }
  const widthPercent = 50 / circle.radius;
  return {
    widthPercent,
    leftPercent: 50 - circle.x * widthPercent,
    topPercent: 50 - circle.y * widthPercent * (height / width),
    origin: `${circle.x * 100}% ${circle.y * 100}%`,
    turn,
  };
}
