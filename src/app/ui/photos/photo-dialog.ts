import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule } from '@angular/material/dialog';

/** A photo to show, with its words. */
export interface StripPhoto {
  readonly id: string;
  readonly thumbnail: string;
  readonly full: string;
  readonly alt: string;
  readonly caption: string;
  readonly origin: string;
  readonly isRemovable: boolean;
}

/** One photo, as large as the window lets it be. */
@Component({
  selector: 'app-photo-dialog',
  template: `
    <mat-dialog-content>
      <img [src]="photo.full" [alt]="photo.alt" />
      <p>
        {{ photo.caption }} <small>{{ photo.origin }}</small>
      </p>
    </mat-dialog-content>
    <mat-dialog-actions align="end">
      <button matButton type="button" mat-dialog-close>Close</button>
    </mat-dialog-actions>
  `,
  styles: `
    img {
      display: block;
      max-width: 100%;
      max-height: 68vh;
      border-radius: 8px;
    }

    p {
      margin: 10px 0 0;
    }

    small {
      color: var(--ink-2);
    }

    button {
      min-height: var(--target);
    }
  `,
  imports: [MatButton, MatDialogModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PhotoDialog {
  protected readonly photo = inject<StripPhoto>(MAT_DIALOG_DATA);
}
