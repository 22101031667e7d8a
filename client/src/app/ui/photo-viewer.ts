import { Injectable, Injector, inject } from '@angular/core';
import { PhotoView } from '#shared/reports/photo';

/** Opens the uncropped picture over the page. The dialog's code is fetched with the first one. */
@Injectable({ providedIn: 'root' })
export class PhotoViewer {
  private readonly injector = inject(Injector);

  /** `text` says what the picture shows; `caption` is the reporter's own, may be empty. */
  async open(photo: PhotoView, text: string, caption = ''): Promise<void> {
    const { openPhotoDialog } = await import('./photo-dialog');
    openPhotoDialog(this.injector, { photo, text, caption });
  }
}
