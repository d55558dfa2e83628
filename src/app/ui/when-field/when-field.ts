import { ChangeDetectionStrategy, Component, input, signal } from '@angular/core';
import { ReactiveFormsModule, type FormControl } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';

/** When something happened: now, unless somebody says another day and time. */
@Component({
  selector: 'app-when-field',
  template: `
    @if (isOpen() || control().value !== '') {
      <mat-form-field appearance="outline" subscriptSizing="dynamic">
        <mat-label>When</mat-label>
        <input matInput type="datetime-local" [formControl]="control()" [min]="min()" [max]="max()" />
        <mat-hint>By the room’s clock. Empty means now.</mat-hint>
        <mat-error>{{ problem() ?? 'Choose a day and time.' }}</mat-error>
      </mat-form-field>
    } @else {
      <button matButton type="button" (click)="isOpen.set(true)">{{ nowWord() }}. Another time?</button>
    }
  `,
  styles: `
    :host {
      display: block;
    }

    mat-form-field {
      width: 100%;
    }

    button {
      min-height: var(--target);
    }
  `,
  imports: [MatButton, MatFormFieldModule, MatInput, ReactiveFormsModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class WhenField {
  /** Day and time by the room's clock as the field gives them; empty for now. */
  readonly control = input.required<FormControl<string>>();
  /** Earliest and latest that may be chosen, in the same form. */
  readonly min = input<string | null>(null);
  readonly max = input<string | null>(null);
  /** What is wrong with it; null for the field's own words. */
  readonly problem = input<string | null>(null);
  /** What now is called: "Now", "Sown now". */
  readonly nowWord = input('Now');

  protected readonly isOpen = signal(false);
}
