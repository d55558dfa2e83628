import { inject, Injectable } from '@angular/core';
import { MatSnackBar } from '@angular/material/snack-bar';

const shortMs = 5000;
const undoMs = 9000;

/** Says briefly, and politely to a screen reader, what was done; with a way to undo it where there is one. */
@Injectable({ providedIn: 'root' })
export class Toast {
  private readonly snackBar = inject(MatSnackBar);

  /** Says what was done. */
  say(text: string): void {
    this.snackBar.open(text, undefined, { duration: shortMs });
  }

  /** Says what was done and offers to undo it for some seconds. */
  sayWithUndo(text: string, undo: () => void): void {
    this.snackBar.open(text, 'Undo', { duration: undoMs }).onAction().subscribe(undo);
  }
}
