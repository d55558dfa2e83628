import { ChangeDetectionStrategy, Component, computed, input, signal } from '@angular/core';
import { ReactiveFormsModule, type FormControl } from '@angular/forms';
import { MatAutocompleteModule } from '@angular/material/autocomplete';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { matchingCrops, type PickedCrop } from './matching-crops';

/** A field for one crop, found by any part of its name, its botanical name or a variety of the room. */
@Component({
  selector: 'app-crop-picker',
  template: `
    <mat-form-field appearance="outline" subscriptSizing="dynamic" hideRequiredMarker>
      <mat-label>Crop</mat-label>
      <input
        matInput
        #field
        autocomplete="off"
        [formControl]="control()"
        [matAutocomplete]="list"
        (input)="typed.set(field.value)"
        (focus)="typed.set('')"
      />
      <mat-autocomplete
        #list
        requireSelection
        autoActiveFirstOption
        [displayWith]="nameOf()"
        (opened)="typed.set('')"
      >
        @for (crop of matches(); track crop.id) {
          <mat-option [value]="crop.id">
            {{ crop.name }} <i>{{ crop.botanicalName }}</i>
          </mat-option>
        } @empty {
          <mat-option disabled>No crop of that name</mat-option>
        }
      </mat-autocomplete>
      <mat-hint>Type a part of its name, then choose from the list.</mat-hint>
      <mat-error>Choose a crop from the list.</mat-error>
    </mat-form-field>
  `,
  styles: `
    mat-form-field {
      width: 100%;
    }

    i {
      color: var(--ink-2);
    }
  `,
  imports: [MatAutocompleteModule, MatFormFieldModule, MatInput, ReactiveFormsModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class CropPicker {
  readonly crops = input.required<readonly PickedCrop[]>();
  /** Holds the crop's id; null until one is chosen. */
  readonly control = input.required<FormControl<string | null>>();

  protected readonly typed = signal('');
  protected readonly matches = computed(() => matchingCrops(this.crops(), this.typed()));
  protected readonly nameOf = computed(() => {
    const names = new Map(this.crops().map(({ id, name }) => [id, name]));
    return (id: string | null): string => (id === null ? '' : (names.get(id) ?? ''));
  });
}
