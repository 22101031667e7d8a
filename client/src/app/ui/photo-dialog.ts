import { DIALOG_DATA, Dialog, DialogRef } from '@angular/cdk/dialog';
import { ChangeDetectionStrategy, Component, Injector, inject } from '@angular/core';
import { PhotoView, photoAddress } from '#shared/reports/photo';

import { Icon } from './icon';

export interface PhotoDialogData {
  readonly photo: PhotoView;
  readonly text: string;
  readonly caption: string;
}

export function openPhotoDialog(injector: Injector, data: PhotoDialogData): void {
  injector.get(Dialog).open(PhotoDialog, { data, ariaLabel: data.text, maxWidth: '100vw' });
}

/** The whole picture as it came, on stone, with nothing cut away. */
@Component({
  selector: 'tn-photo-dialog',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Icon],
  template: `
    <figure>
      <img [src]="address" [alt]="data.text" [width]="data.photo.width"
        [height]="data.photo.height" />
      <figcaption>
        <span>
          <b i18n>Counterfeit report</b> · {{ data.text }}
          @if (data.caption) {
            · {{ data.caption }}
          }
        </span>
        <button type="button" (click)="close()">
          <tn-icon name="close" />
          <ng-container i18n>Close</ng-container>
        </button>
      </figcaption>
    </figure>
  `,
  styles: `
    :host {
      display: block;
      padding: 16px;
      border-radius: var(--tn-radius-card);
      background: var(--tn-disc-ground);
      color: var(--tn-on-stone);
      color-scheme: dark;
    }
    figure {
      margin: 0;
    }
    img {
      display: block;
      width: auto;
      max-width: calc(100vw - 48px);
      height: auto;
      max-height: calc(100dvh - 120px);
      margin: 0 auto;
    }
    figcaption {
      display: flex;
      align-items: center;
      justify-content: space-between;
      gap: 16px;
      padding-top: 12px;
      font-size: 16px;
    }
    button {
      flex: none;
      padding: 9px 16px;
      border: 1.5px solid var(--tn-stone-line);
      border-radius: var(--tn-radius-control);
      background: none;
      color: inherit;
      font: 600 16px var(--tn-font-text);
      cursor: pointer;
    }
  `,
})
export class PhotoDialog {
  private readonly reference = inject<DialogRef<void>>(DialogRef);

  protected readonly data = inject<PhotoDialogData>(DIALOG_DATA);
  protected readonly address = photoAddress(this.data.photo.id, 'large', 'jpeg');

  protected close(): void {
    this.reference.close();
  }
}
