import { inject, Injectable } from '@angular/core';
import { MatDialog } from '@angular/material/dialog';
import { map, type Observable } from 'rxjs';
import { ConfirmDialog, type Question } from './confirm-dialog';

/** Asks a person before something is done. */
@Injectable({ providedIn: 'root' })
export class Asking {
  private readonly dialog = inject(MatDialog);

  /** Emits once, whether it was confirmed. Closing the dialog in any other way means no. */
  ask(question: Question): Observable<boolean> {
    return this.dialog
      .open<ConfirmDialog, Question, boolean>(ConfirmDialog, {
        data: question,
        role: 'alertdialog',
        maxWidth: '460px',
        autoFocus: question.isDestructive ? '.back' : '.deed',
      })
      .afterClosed()
      .pipe(map((isConfirmed) => isConfirmed === true));
  }
}
