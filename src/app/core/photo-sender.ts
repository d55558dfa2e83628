import { inject, Injectable, signal } from '@angular/core';
import { PHOTO_MAX_BYTES, type Photo } from '@shared/contracts/photos';
import { filter, finalize, map, tap, type Observable, type Subscription } from 'rxjs';
import type { UploadStep } from './api-client';
import { failureText } from './failure-text';
import { Notices } from './notices';

const taken = ['image/jpeg', 'image/png', 'image/webp'];
const megabyte = 1_000_000;

/** Sends one photo at a time and says how far it has come. One for each place that takes photos. */
@Injectable()
export class PhotoSender {
  private readonly notices = inject(Notices);
  private readonly progress = signal<{ readonly name: string; readonly percent: number | null } | null>(null);
  private readonly wrong = signal<string | null>(null);
  private upload: Subscription | null = null;

  /** What is being sent and how much of it has arrived [%], null while that is not known; null when idle. */
  readonly sending = this.progress.asReadonly();
  /** Why the last photo was not taken; null when it was. */
  readonly problem = this.wrong.asReadonly();

  /**
   * Sends a photo. One that is too large, or no picture at all, is refused before anything is sent.
   *
   * @param file - As it was chosen.
   * @param call - Uploads a form whose field `file` is the photo.
   * @param arrived - Told of the photo once it is kept.
   */
  send(
    file: File,
    call: (form: FormData) => Observable<UploadStep<Photo>>,
    arrived: (photo: Photo) => void,
  ): void {
    if (this.progress() !== null) return;
    const refusal = photoRefusal(file);
    this.wrong.set(refusal);
    if (refusal !== null) return;
    this.progress.set({ name: file.name, percent: null });
    const form = new FormData();
    form.append('file', file);
    this.upload = call(form)
      .pipe(
        tap((step) => {
          if (step.type === 'sending') this.progress.set({ name: file.name, percent: percentOf(step) });
        }),
        filter((step) => step.type === 'answered'),
        map(({ reply }) => reply),
        finalize(() => this.progress.set(null)),
      )
      .subscribe({
        next: (photo) => {
          arrived(photo);
          this.notices.say('Photo added');
        },
        error: (error: unknown) => this.wrong.set(`${file.name}: ${failureText(error)}`),
      });
  }

  /** Gives up what is being sent. */
  stop(): void {
    this.upload?.unsubscribe();
  }
}

function percentOf(step: { readonly sentBytes: number; readonly totalBytes: number | null }): number | null {
  if (step.totalBytes === null || step.totalBytes === 0) return null;
  return Math.floor((100 * step.sentBytes) / step.totalBytes);
}

/** Why a file can't be a photo here, in a sentence; null when it may be one. */
export function photoRefusal({ name, size, type }: Pick<File, 'name' | 'size' | 'type'>): string | null {
  if (size === 0) return `${name} is empty. Choose another picture.`;
  if (!taken.includes(type))
    return `${name} is no JPEG, PNG or WebP picture. Nothing was sent; save it as one of these first.`;
  if (size > PHOTO_MAX_BYTES)
    return `${name} has ${(size / megabyte).toFixed(1)} MB; a photo may have ${PHOTO_MAX_BYTES / megabyte} MB. Nothing was sent; save it smaller, or send a picture of lower quality.`;
  return null;
}
