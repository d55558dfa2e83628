import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule } from '@angular/material/dialog';

/** What is asked before something is done that cannot be taken back. */
export interface Question {
  readonly title: string;
  /** What will happen, and what will be kept. */
  readonly text: string;
  /** The deed as a verb: "Delete the shelf". */
  readonly confirm: string;
  /** Whether the deed destroys something; then its button is ember and the focus is on the way back. */
  readonly isDestructive: boolean;
}

/** Asks one question. Opened through `Asking`. */
@Component({
  selector: 'app-confirm-dialog',
  template: `
    <h2 mat-dialog-title>{{ question.title }}</h2>
    <mat-dialog-content>{{ question.text }}</mat-dialog-content>
    <mat-dialog-actions align="end">
      <button matButton type="button" class="back" [mat-dialog-close]="false">Leave it</button>
      <button
        class="deed"
        matButton="filled"
        type="button"
        [mat-dialog-close]="true"
        [class.destructive]="question.isDestructive"
      >
        {{ question.confirm }}
      </button>
    </mat-dialog-actions>
  `,
  styles: `
    .destructive {
      --mat-button-filled-container-color: var(--ember);
    }
  `,
  imports: [MatButton, MatDialogModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ConfirmDialog {
  protected readonly question = inject<Question>(MAT_DIALOG_DATA);
}
