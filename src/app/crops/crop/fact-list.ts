import { ChangeDetectionStrategy, Component, input, output } from '@angular/core';
import { MatButton, MatIconButton } from '@angular/material/button';
import { MatIcon } from '@angular/material/icon';
import { Explained } from '../../ui/explained/explained';
import { Sourced } from '../../ui/sourced/sourced';
import type { CropSlot } from '../figure/crop-slot';
import type { Fact } from './crop-facts';

/** Facts with their figures, each with its source; says honestly where no figure was found. */
@Component({
  selector: 'app-fact-list',
  templateUrl: './fact-list.html',
  styleUrl: './fact-list.scss',
  imports: [Explained, MatButton, MatIcon, MatIconButton, Sourced],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class FactList {
  readonly facts = input.required<readonly Fact[]>();
  readonly mayChange = input(false);

  readonly chosen = output<CropSlot>();
}
