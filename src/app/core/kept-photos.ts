import { inject, Injectable } from '@angular/core';
import { getPhotoImage, removePhoto, type Photo } from '@shared/contracts/photos';
import { catchError, EMPTY, filter, map, switchMap, type Observable } from 'rxjs';
import { ApiClient, apiPath } from './api-client';
import { Notices } from './notices';
import { ReaderFormat } from './reader-format';
import { Session } from './session';

/** A photo as a page shows it. */
export interface ShownPhoto {
  readonly id: string;
  /** Address of the small picture. */
  readonly thumbnail: string;
  /** Address of the picture as it is kept. */
  readonly full: string;
  /** What a screen reader says of it. */
  readonly alt: string;
  readonly caption: string;
  /** Who added it and when. */
  readonly origin: string;
  /** Whether this person may remove it: growers any, a helper their own. */
  readonly isRemovable: boolean;
}

const question = {
  title: 'Remove this photo?',
  text: 'It can’t be brought back.',
  confirm: 'Remove the photo',
  isDestructive: true,
} as const;

/** Shows the photos that are kept of something, and removes them. */
@Injectable({ providedIn: 'root' })
export class KeptPhotos {
  private readonly api = inject(ApiClient);
  private readonly format = inject(ReaderFormat);
  private readonly notices = inject(Notices);
  private readonly session = inject(Session);

  /**
   * Photos with their addresses and words. Reads signals, so templates follow it.
   *
   * @param photos - As the API tells them, of the person's room.
   * @param about - What they show, for one without a caption: "Leek Winter Piper".
   */
  shown(photos: readonly Photo[], about: string): readonly ShownPhoto[] {
    const self = this.session.account()?.id;
    return photos.map((photo) => {
      const { id, at, caption, personId, personName } = photo;
      const when = this.format.when(at);
      return {
        id,
        thumbnail: this.thumbnailOf(photo),
        full: this.addressOf(photo),
        alt: caption === '' ? `Photo of ${about}, ${when}` : caption,
        caption,
        origin: [when, personName].filter((part) => part !== null).join(' · '),
        isRemovable: this.session.may('grower') || (this.session.may('helper') && personId === self),
      };
    });
  }

  /** Address of the small picture. */
  thumbnailOf(photo: Photo): string {
    return `${this.addressOf(photo)}?size=thumbnail`;
  }

  /**
   * Removes a photo once the person agrees; says why where that fails.
   *
   * @param photoId - Which.
   * @param ask - Asks the person; emits whether they agree.
   * @returns Emits the photo's id when it is gone.
   */
  remove(photoId: string, ask: (about: typeof question) => Observable<boolean>): Observable<string> {
    const roomId = this.session.roomId() ?? '';
    return ask(question).pipe(
      filter(Boolean),
      switchMap(() => this.api.call(removePhoto, { params: { roomId, photoId } })),
      map(() => photoId),
      catchError((error: unknown) => {
        this.notices.sayFailure(error);
        return EMPTY;
      }),
    );
  }

  private addressOf({ id }: Photo): string {
    return apiPath(getPhotoImage.path, { roomId: this.session.roomId() ?? '', photoId: id });
  }
}
