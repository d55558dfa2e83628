import { ChangeDetectionStrategy, Component, computed, input, output, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatSelectModule } from '@angular/material/select';
import { quantities, type Quantity } from '@shared/climate/quantity';
import type { FileColumn, FileSeries } from '@shared/contracts/logger-files';
import { quantityRules } from '@shared/logger-files/quantities';
import { unitsOf } from '@shared/logger-files/units';
import { roleWords, unitWords } from '../file-words';

/** What a column holds, as the server takes it; null is not read. */
export interface ColumnHolds {
  readonly index: number;
  readonly quantity: Quantity | null;
  readonly unit: string | null;
}

/** What a column was taken for and why; a person may say that it holds something else, or in another unit. */
@Component({
  selector: 'app-column-meaning',
  templateUrl: './column-meaning.html',
  styleUrl: './choice.scss',
  imports: [MatButton, MatFormFieldModule, MatSelectModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ColumnMeaning {
  readonly column = input.required<FileColumn>();
  /** The series of this column; several in a long file, none where nothing is read from it. */
  readonly series = input.required<readonly FileSeries[]>();
  readonly mayMatch = input.required<boolean>();
  /** Whether rows name their quantity themselves; then no column holds values of its own. */
  readonly isLong = input.required<boolean>();
  readonly changed = output<ColumnHolds>();

  protected readonly quantities = quantities.map((quantity) => ({
    quantity,
    name: quantityRules[quantity].label,
  }));
  protected readonly isOpen = signal(false);
  protected readonly name = computed(() => this.column().name || `column ${this.column().index + 1}`);
  /** Times, names and row numbers are what they are. */
  protected readonly isChangeable = computed(
    () => this.mayMatch() && !this.isLong() && ['quantity', 'ignore'].includes(this.column().role),
  );
  protected readonly holds = computed(() => {
    const { quantity, role } = this.column();
    const [first] = this.series();
    if (quantity === null || first === undefined) return roleWords(role);
    return `${quantityRules[quantity].label}, ${unitWords(first)}`;
  });
  protected readonly units = computed(() => {
    const { quantity } = this.column();
    return quantity === null ? [] : unitsOf(quantity);
  });

  protected toggle(): void {
    this.isOpen.update((isOpen) => !isOpen);
  }

  protected chooseQuantity(quantity: Quantity | null): void {
    const unit = quantity === null ? null : (unitsOf(quantity)[0] ?? null);
    this.changed.emit({ index: this.column().index, quantity, unit });
  }

  protected chooseUnit(unit: string): void {
    const { index, quantity } = this.column();
    this.changed.emit({ index, quantity, unit });
  }
}
