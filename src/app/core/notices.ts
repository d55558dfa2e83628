import { inject, Injectable } from '@angular/core';
import { MatSnackBar } from '@angular/material/snack-bar';
import { type Observable } from 'rxjs';
import { failureText } from './failure-text';

const shownMs = 6_000;
const undoableMs = 10_000;

/** Short words at the foot of the page about what was just done. Read out politely. */
@Injectable({ providedIn: 'root' })
export class Notices {
  private readonly bar = inject(MatSnackBar);

  /** Says that something was done. */
  say(text: string): void {
    this.bar.open(text, undefined, { duration: shownMs });
  }

  /**
   * Says that something was done, with a way back.
   *
   * @returns Emits once if the person wants it undone.
   */
  sayUndoable(text: string): Observable<void> {
    return this.bar.open(text, 'Undo', { duration: undoableMs }).onAction();
  }

  /** Says why something failed; stays until it is read. */
  sayFailure(error: unknown): void {
    this.bar.open(failureText(error), 'Close');
  }
}
