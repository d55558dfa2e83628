import { ChangeDetectionStrategy, Component, inject, input, output, signal } from '@angular/core';
import { MatButton, MatIconButton } from '@angular/material/button';
import { MatDialog } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatIcon } from '@angular/material/icon';
import { MatInput } from '@angular/material/input';
import { MatProgressBar } from '@angular/material/progress-bar';
import { ProblemText } from '../states/problem-text';
import { PhotoDialog, type StripPhoto } from './photo-dialog';

/** Photos of one thing side by side, and a place to add another. */
@Component({
  selector: 'app-photo-strip',
  templateUrl: './photo-strip.html',
  styleUrl: './photo-strip.scss',
  imports: [MatButton, MatFormFieldModule, MatIcon, MatIconButton, MatInput, MatProgressBar, ProblemText],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PhotoStrip {
  /** Newest first. */
  readonly photos = input.required<readonly StripPhoto[]>();
  readonly mayAdd = input(false);
  /** What is being sent; null when nothing is. */
  readonly sending = input<{ readonly name: string; readonly percent: number | null } | null>(null);
  readonly problem = input<string | null>(null);
  /** A picture was chosen, with what it shows in words. */
  readonly chosen = output<{ readonly file: File; readonly caption: string }>();
  readonly removed = output<string>();
  readonly stopped = output();

  private readonly dialog = inject(MatDialog);
  protected readonly caption = signal('');

  protected choose(chooser: HTMLInputElement): void {
    const file = chooser.files?.[0];
    if (file !== undefined) this.chosen.emit({ file, caption: this.caption().trim() });
    this.caption.set('');
    // The same file may be chosen again after a failure.
    chooser.value = '';
  }

  protected show(photo: StripPhoto): void {
    this.dialog.open(PhotoDialog, { data: photo, maxWidth: '96vw', ariaLabel: photo.alt });
  }
}
