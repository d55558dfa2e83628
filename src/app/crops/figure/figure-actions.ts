import { ChangeDetectionStrategy, Component, input, output } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatDialogModule } from '@angular/material/dialog';

/** The foot of a dialog that changes a figure: take it away, leave it, save it. */
@Component({
  selector: 'app-figure-actions',
  template: `
    <mat-dialog-actions align="end">
      @if (isThere()) {
        <button matButton class="remove" type="button" [disabled]="isSaving()" (click)="takenAway.emit()">
          Take it away
        </button>
      }
      <button matButton type="button" [mat-dialog-close]="false">Leave it</button>
      <button matButton="filled" type="submit" [disabled]="isSaving()">Save the figure</button>
    </mat-dialog-actions>
  `,
  styles: `
    :host {
      display: contents;
    }

    button {
      min-height: var(--target);
    }

    .remove {
      margin-right: auto;
      --mat-button-text-label-text-color: var(--ember);
    }
  `,
  imports: [MatButton, MatDialogModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class FigureActions {
  /** Whether there is a figure to take away. */
  readonly isThere = input.required<boolean>();
  readonly isSaving = input.required<boolean>();
  readonly takenAway = output();
}
