import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { ReactiveFormsModule, type FormControl } from '@angular/forms';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';

/** Asks who says so. */
@Component({
  selector: 'app-source-field',
  template: `
    <mat-form-field appearance="outline" subscriptSizing="dynamic">
      <mat-label>Who says so</mat-label>
      <input matInput maxlength="400" [formControl]="control()" />
      <mat-hint>A book, a packet, a grower. Empty means our own experience.</mat-hint>
    </mat-form-field>
  `,
  styles: `
    mat-form-field {
      width: 100%;
    }
  `,
  imports: [MatFormFieldModule, MatInput, ReactiveFormsModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SourceField {
  readonly control = input.required<FormControl<string>>();
}
