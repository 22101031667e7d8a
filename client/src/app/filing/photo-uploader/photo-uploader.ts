import { HttpEventType } from '@angular/common/http';
import { ChangeDetectionStrategy, Component, DestroyRef, inject, output, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { Subject, catchError, mergeMap, of, tap } from 'rxjs';
import { UploadedPhoto } from '#shared/reports/photo';

import { problemOf } from '../../http/api-failure';
import { problemWords } from '../../http/problem-words';
import { Icon } from '../../ui/icon';
import { FilingApi, NEW_ID } from '../filing-api';

const bytesAtMost = 25 * 1024 * 1024;
const pixelsAtMost = 60_000_000;
const takenTypes = ['image/jpeg', 'image/png', 'image/webp'];
/** Photos under way at once; more would only share the same line. */
const uploadsAtOnce = 2;

interface Upload {
  readonly id: string;
  readonly name: string;
  readonly file: File;
  readonly percent: number;
  readonly problem: string;
}

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
  private readonly api = inject(FilingApi);
  private readonly newId = inject(NEW_ID);
  private readonly queue = new Subject<Upload>();

  readonly uploaded = output<UploadedPhoto>();

  protected readonly uploads = signal<readonly Upload[]>([]);
  protected readonly isOver = signal(false);

  constructor() {
    this.queue
      .pipe(
        mergeMap((upload) => this.send(upload), uploadsAtOnce),
        takeUntilDestroyed(inject(DestroyRef)),
      )
      .subscribe();
  }

  protected takeDropped(event: DragEvent): void {
    event.preventDefault();
    this.isOver.set(false);
    this.takeFiles(event.dataTransfer?.files ?? null);
  }

  protected markOver(event: DragEvent): void {
    event.preventDefault();
    this.isOver.set(true);
  }

  protected takeFiles(files: FileList | null, input?: HTMLInputElement): void {
    for (const file of Array.from(files ?? [])) void this.takeFile(file);
    // So that the same file can be chosen again after it was refused.
    if (input) input.value = '';
  }

  protected sendingWords({ name }: Upload): string {
    return $localize`Sending ${name}:file:`;
  }

  protected retryUpload(upload: Upload): void {
    this.change(upload.id, { problem: '', percent: 0 });
    this.queue.next(upload);
  }

  protected forgetUpload(id: string): void {
    this.uploads.update((uploads) => uploads.filter((upload) => upload.id !== id));
  }

  private async takeFile(file: File): Promise<void> {
    const problem = await whyNot(file);
    const upload = { id: this.newId(), name: file.name, file, percent: 0, problem };
    this.uploads.update((uploads) => [...uploads, upload]);
    if (!problem) this.queue.next(upload);
  }

  private send(upload: Upload) {
    return this.api.uploadPhoto(upload.id, upload.file).pipe(
      tap((event) => {
        if (event.type === HttpEventType.UploadProgress && event.total) {
          this.change(upload.id, { percent: Math.round((100 * event.loaded) / event.total) });
        }
        if (event.type === HttpEventType.Response && event.body) {
          this.forgetUpload(upload.id);
          this.uploaded.emit(event.body);
        }
      }),
      catchError((error: unknown) => {
        this.change(upload.id, { problem: problemWords(problemOf(error)) });
        return of(null);
      }),
    );
  }

  private change(id: string, change: Partial<Upload>): void {
    this.uploads.update((uploads) =>
      uploads.map((upload) => (upload.id === id ? { ...upload, ...change } : upload)),
    );
  }
}

/** Why a file can't be taken, or an empty string. */
async function whyNot(file: File): Promise<string> {
  if (!takenTypes.includes(file.type)) {
    return $localize`This is no JPEG, PNG or WebP picture.`;
  }
  if (file.size > bytesAtMost) {
    return $localize`The photo is larger than 25 MB. Save it smaller and try again.`;
  }
  try {
    const picture = await createImageBitmap(file);
    const pixels = picture.width * picture.height;
    picture.close();
    if (pixels > pixelsAtMost) {
      return $localize`The photo has more than 60 million pixels. Save it smaller and try again.`;
    }
  } catch {
    return $localize`The picture is damaged and cannot be opened.`;
  }
  return '';
}
