import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import type { Planting } from '@shared/contracts/plantings';
import { ReaderFormat } from '../../core/reader-format';
import { Session } from '../../core/session';
import { plantLook } from '../../ui/plants/crop-look';
import { PlantDrawing } from '../../ui/plants/plant-drawing';
import { countWords, harvestWords, placeWords, plantingTitle, standingWords } from '../words/planting-facts';
import type { Grouping } from './planting-groups';

/** One planting in a list; where seedlings are awaited, with the short way to count them. */
@Component({
  selector: 'app-planting-row',
  template: `
    <a class="planting" [routerLink]="['/plantings', planting().id]">
      <app-plant-drawing [form]="look().form" [family]="look().family" />
      <span class="name">
        <b>{{ title() }}</b>
        <small>{{ facts() }}</small>
      </span>
      <span class="count">{{ count() }}</span>
    </a>
    @if (isAwaited()) {
      <a matButton="outlined" [routerLink]="['/plantings', planting().id]">
        Count<span class="read-out-only">&ngsp;{{ title() }}</span>
      </a>
    }
  `,
  styleUrl: './planting-row.scss',
  imports: [MatButton, PlantDrawing, RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PlantingRow {
  readonly planting = input.required<Planting>();
  /** What the heading above says already. */
  readonly grouping = input.required<Grouping>();

  private readonly format = inject(ReaderFormat);
  private readonly session = inject(Session);

  protected readonly title = computed(() => plantingTitle(this.planting()));
  protected readonly look = computed(() => plantLook(this.planting()));
  protected readonly count = computed(() => countWords(this.planting()));
  protected readonly facts = computed(() => {
    const planting = this.planting();
    const harvest = harvestWords(planting);
    return [
      standingWords(planting, this.format.today()),
      this.grouping() === 'shelf' ? null : placeWords(planting),
      planting.container === '' ? null : planting.container,
      harvest === null ? null : `${harvest} harvested`,
    ]
      .filter((part) => part !== null)
      .join(' · ');
  });
  protected readonly isAwaited = computed(() => {
    const { origin, stage } = this.planting();
    return origin === 'sown' && (stage === 'sown' || stage === 'emerging') && this.session.may('helper');
  });
}
