import { ChangeDetectionStrategy, Component, input, output, signal } from '@angular/core';
import { FormControl, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { ProblemText } from '../../ui/states/problem-text';

/** Takes a few words. */
@Component({
  selector: 'app-words-panel',
  template: `
    <form (submit)="$event.preventDefault(); confirm()" novalidate>
      <mat-form-field appearance="outline" subscriptSizing="dynamic">
        <mat-label>{{ label() }}</mat-label>
        <input
          matInput
          autocomplete="off"
          enterkeyhint="done"
          [formControl]="words"
          [maxlength]="longest()"
          (keydown.escape)="left.emit()"
        />
        <mat-hint>{{ hint() }}</mat-hint>
      </mat-form-field>
      <app-problem-text [message]="problem()" />
      <div class="actions">
        <button matButton="filled" type="submit" [disabled]="isBusy()">{{ confirmText() }}</button>
        <button matButton type="button" (click)="left.emit()">Leave it</button>
      </div>
    </form>
  `,
  styleUrl: './panel.scss',
  imports: [MatButton, MatFormFieldModule, MatInput, ProblemText, ReactiveFormsModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class WordsPanel {
  readonly label = input.required<string>();
  readonly hint = input.required<string>();
  readonly confirmText = input.required<string>({ alias: 'confirm' });
  readonly longest = input.required<number>();
  readonly isOptional = input(false);
  readonly isBusy = input(false);

  /** The words, trimmed. */
  readonly confirmed = output<string>();
  readonly left = output();

  protected readonly words = new FormControl('', { nonNullable: true });
  protected readonly problem = signal<string | null>(null);

  protected confirm(): void {
    const words = this.words.value.trim();
    const isMissing = words === '' && !this.isOptional();
    this.problem.set(isMissing ? 'Write a few words first.' : null);
    if (!isMissing) this.confirmed.emit(words);
  }
}
