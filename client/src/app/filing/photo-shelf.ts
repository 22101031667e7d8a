import { HttpEventType } from '@angular/common/http';
import { DestroyRef, Injectable, computed, inject, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { EMPTY, Observable, Subject, catchError, concatMap, finalize, retry, tap, throwError,
  timer } from 'rxjs';
import { BlurArea, UploadedPhoto } from '#shared/reports/photo';

import { isNetworkFailure, problemOf } from '../http/api-failure';
import { problemWords } from '../http/problem-words';
import { NEW_ID } from '../ui/new-id';
import { DraftStore } from './draft-store';
import { FilingApi } from './filing-api';
import { likelyCircle, likelySide } from './filing-content';
import { headerLength, pictureHeader } from './picture-header';

const bytesAtMost = 25 * 1024 * 1024;
const pixelsAtMost = 60_000_000;
const retryTime = 2_000;

export interface Upload {
  readonly id: string;
  readonly name: string;
  readonly file: File;
  readonly percent: number;
  readonly problem: string;
  /** Refused before it was sent: trying again would not help. */
  readonly refused: boolean;
}

/**
 * The photos of the report being written: under way, and those that the server has. It lives as
 * long as the form, so that photos go on being sent while another step is filled in.
 */
@Injectable()
export class PhotoShelf {
  private readonly api = inject(FilingApi);
  private readonly store = inject(DraftStore);
  private readonly newId = inject(NEW_ID);
  private readonly destroyRef = inject(DestroyRef);
  private readonly queue = new Subject<Upload>();
  private readonly asked = new Set<string>();

  readonly uploads = signal<readonly Upload[]>([]);
  readonly isSending = computed(() => this.uploads().some(({ problem }) => !problem));
  /** Sizes and blurs of the photos, which the draft does not hold. */
  readonly known = signal<ReadonlyMap<string, UploadedPhoto>>(new Map());
  readonly problem = signal('');
  /** The photo that is being blurred. */
  readonly blurring = signal<string | null>(null);
  /** The last photo that arrived. */
  readonly newest = signal<string | null>(null);

  constructor() {
    // One after the other: side by side they share one line, and the first would not be first.
    this.queue
      .pipe(
        concatMap((upload) => this.send(upload)),
        takeUntilDestroyed(),
      )
      .subscribe();
  }

  /** Checks the files and sends those that can be taken, in their order. */
  async take(files: readonly File[]): Promise<void> {
    for (const file of files) {
      const problem = await whyNot(file);
      const upload: Upload = {
        id: this.newId(), name: file.name, file, percent: 0, problem, refused: problem !== '',
      };
      this.uploads.update((uploads) => [...uploads, upload]);
      if (!problem) this.queue.next(upload);
    }
  }

  retryUpload(upload: Upload): void {
    this.change(upload.id, { problem: '', percent: 0 });
    this.queue.next(upload);
  }

  forgetUpload(id: string): void {
    this.uploads.update((uploads) => uploads.filter((upload) => upload.id !== id));
  }

  /** Fetches what is not known yet of the report's photos. */
  fetchPhotos(): void {
    this.problem.set('');
    for (const { photoId } of this.store.content().photos) {
      if (this.known().has(photoId) || this.asked.has(photoId)) continue;
      this.asked.add(photoId);
      this.api
        .photo(photoId)
        .pipe(
          finalize(() => this.asked.delete(photoId)),
          takeUntilDestroyed(this.destroyRef),
        )
        .subscribe({
          next: (photo) => this.remember(photo),
          error: (error: unknown) => this.problem.set(problemWords(problemOf(error))),
        });
    }
  }

  blurPhoto(id: string, blurs: readonly BlurArea[]): void {
    this.problem.set('');
    this.blurring.set(id);
    this.api
      .blurPhoto(id, blurs)
      .pipe(
        finalize(() => this.blurring.set(null)),
        takeUntilDestroyed(this.destroyRef),
      )
      .subscribe({
        next: (photo) => this.remember(photo),
        error: (error: unknown) => this.problem.set(problemWords(problemOf(error))),
      });
  }

  private send(upload: Upload): Observable<unknown> {
    return this.api.uploadPhoto(upload.id, upload.file).pipe(
      tap((event) => {
        if (event.type === HttpEventType.UploadProgress && event.total) {
          this.change(upload.id, { percent: Math.round((100 * event.loaded) / event.total) });
        }
        if (event.type === HttpEventType.Response && event.body) this.receive(event.body);
      }),
      // Sent again with the same id it makes one photo.
      retry({
        count: 2,
        delay: (error: unknown) =>
          isNetworkFailure(problemOf(error)) ? timer(retryTime) : throwError(() => error),
      }),
      catchError((error: unknown) => {
        this.change(upload.id, { problem: problemWords(problemOf(error)) });
        return EMPTY;
      }),
    );
  }

  private receive(photo: UploadedPhoto): void {
    this.forgetUpload(photo.id);
    this.remember(photo);
    const { photos } = this.store.content();
    if (photos.some(({ photoId }) => photoId === photo.id)) return;
    const side = likelySide(photos);
    const circle =
      side === 'obverse' || side === 'reverse' ? likelyCircle(photo.width, photo.height) : null;
    this.store.update({
      photos: [...photos, { photoId: photo.id, side, circle, uprightDegrees: 0, caption: '' }],
    });
    this.newest.set(photo.id);
  }

  private remember(photo: UploadedPhoto): void {
    this.known.update((known) => new Map(known).set(photo.id, photo));
  }

  private change(id: string, change: Partial<Upload>): void {
    this.uploads.update((uploads) =>
      uploads.map((upload) => (upload.id === id ? { ...upload, ...change } : upload)),
    );
  }
}

/** Why a file can't be taken, or an empty string. */
async function whyNot(file: File): Promise<string> {
  if (file.size > bytesAtMost) {
    return $localize`It is larger than 25 MB. Save it smaller and try again.`;
  }
  const header = pictureHeader(new Uint8Array(await file.slice(0, headerLength).arrayBuffer()));
  if (!header) return $localize`This is no JPEG, PNG or WebP picture.`;
  if (header.size && header.size.width * header.size.height > pixelsAtMost) {
    return $localize`It has more than 60 million pixels. Save it smaller and try again.`;
  }
  return '';
}
