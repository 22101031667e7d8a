import { ChangeDetectionStrategy, Component, inject, input, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';

import { Icon } from '../../ui/icon';
import { PhotoShelf, Upload } from '../photo-shelf';

/**
 * Takes photos by picker, camera or drag, several at once; each with a bar of its own. What can't
 * be taken is refused before it is sent, with the reason.
 */
@Component({
  selector: 'tn-photo-uploader',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Icon, MatButton],
  templateUrl: './photo-uploader.html',
  styleUrl: './photo-uploader.scss',
})
export class PhotoUploader {
  /** Less room once there are photos. */
  readonly compact = input(false);

  protected readonly shelf = inject(PhotoShelf);
  protected readonly isOver = signal(false);

  protected takeDropped(event: DragEvent): void {
    event.preventDefault();
    this.isOver.set(false);
    void this.shelf.take(Array.from(event.dataTransfer?.files ?? []));
  }

  protected markOver(event: DragEvent): void {
    event.preventDefault();
    this.isOver.set(true);
  }

  protected takeChosen(input: HTMLInputElement): void {
    void this.shelf.take(Array.from(input.files ?? []));
    // So that the same file can be chosen again after it was refused.
    input.value = '';
  }

  protected sendingWords({ name }: Upload): string {
    return $localize`Sending ${name}:file:`;
  }
}
