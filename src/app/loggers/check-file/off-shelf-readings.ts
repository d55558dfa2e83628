import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { MatButton } from '@angular/material/button';
import type { OffShelfReadings as Found } from '@shared/contracts/logger-file-result';
import { filter } from 'rxjs';
import { ReaderFormat } from '../../core/reader-format';
import { Asking } from '../../ui/dialogs/asking';
import { NoteLine } from '../../ui/note-line/note-line';
import { readingWords } from '../file-words';
import { LoggerFileData } from '../logger-file-data';

/** Readings that no shelf would show, and the way to say that their sensors were on their shelves already. */
@Component({
  selector: 'app-off-shelf-readings',
  template: `
    @for (words of lines(); track $index) {
      <app-note-line tone="lamp" icon="info" [text]="words" />
    }
    @if (mayChange() && early().length > 0) {
      <button matButton="outlined" type="button" [disabled]="data.isBusy()" (click)="placeEarlier()">
        {{ early().length === 1 ? 'It was there already' : 'They were there already' }}
      </button>
    }
  `,
  styles: `
    :host {
      display: grid;
      gap: 8px;
      justify-items: start;
      margin: 10px 0;
    }

    button {
      min-height: var(--target);
    }
  `,
  imports: [MatButton, NoteLine],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class OffShelfReadings {
  readonly found = input.required<readonly Found[]>();
  readonly mayChange = input.required<boolean>();

  protected readonly data = inject(LoggerFileData);
  private readonly asking = inject(Asking);
  private readonly format = inject(ReaderFormat);

  protected readonly lines = computed(() => this.found().map((one) => this.line(one)));
  /** Those that a shelf shows once it is known that their sensor was there. */
  protected readonly early = computed(() => this.found().filter(({ when }) => when === 'beforeFirstShelf'));

  protected placeEarlier(): void {
    const early = this.early();
    const places = early.map(
      (one) =>
        `${this.sensorOf(one)} then counts as on shelf ${one.firstShelf?.label ?? ''} since ${this.format.when(one.from)}.`,
    );
    this.asking
      .ask({
        title: early.length === 1 ? 'Was it there already?' : 'Were they there already?',
        text: `${places.join(' ')} That shelf’s charts, sums and alerts of the time follow. It can’t be set later again.`,
        confirm: early.length === 1 ? 'It was there' : 'They were there',
        isDestructive: false,
      })
      .pipe(filter(Boolean))
      .subscribe(() =>
        this.data.placeEarlier(early.map(({ sensorId, from }) => ({ sensorId, since: from }))),
      );
  }

  private line(one: Found): string {
    const { when, count, from, to, firstShelf } = one;
    const span =
      count === 1 ? this.format.when(from) : `${this.format.when(from)} to ${this.format.when(to)}`;
    const readings = `${readingWords(count)} of ${this.sensorOf(one)} (${span})`;
    if (when === 'neverOnShelf') {
      return `${readings} will show on no shelf: the sensor isn’t on one. A keeper can put it there.`;
    }
    if (when === 'betweenShelves' || firstShelf === null) {
      return `${readings} will show on no shelf: the sensor was on none then.`;
    }
    return `${readings} will show on no shelf: the sensor is on ${firstShelf.label} only since ${this.format.when(firstShelf.since)}.`;
  }

  private sensorOf({ sensorId }: Found): string {
    return this.data.sensors().find(({ id }) => id === sensorId)?.words ?? 'a sensor';
  }
}
