import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { Alert } from '@shared/contracts/alerts';
import type { BoardShelf, PlantingSummary } from '@shared/contracts/board';
import { ReaderFormat } from '../../core/reader-format';
import { RoomClock } from '../../core/room-clock';
import { Session } from '../../core/session';
import { LampBar } from '../../ui/lamp-bar/lamp-bar';
import { LampDay } from '../../ui/lamp-day/lamp-day';
import { MeasureStrip } from '../../ui/measure-strip/measure-strip';
import { alertLook } from '../../ui/note-line/alert-look';
import { NoteLine } from '../../ui/note-line/note-line';
import { PlantLabel } from '../../ui/plant-label/plant-label';
import { plantLook } from '../../ui/plants/crop-look';
import { PlantTray } from '../../ui/plants/plant-tray';
import type { ShelfNeed } from '../board/shelf-needs';
import { dayParts, minuteOfDay, type DaySpan } from './day-minutes';
import { plantingSize, plantingWords } from '../../core/planting-words';
import { shelfSituation } from './shelf-situation';
import { shelfStrips } from './shelf-strips';
import { sowingNote } from './sowing-note';

/** The room's day, as a bay needs it. */
export interface BayDay extends DaySpan {
  /** `YYYY-MM-DD`. */
  readonly today: string;
}

/** One shelf as it stands in its rack: the lamp above, the plants on the board, what is measured between. */
@Component({
  selector: 'app-shelf-bay',
  templateUrl: './shelf-bay.html',
  styleUrl: './shelf-bay.scss',
  imports: [LampBar, LampDay, MeasureStrip, NoteLine, PlantLabel, PlantTray, RouterLink],
  host: { '[class.lit]': 'shelf().now.lampDay.lit === true' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ShelfBay {
  readonly shelf = input.required<BoardShelf>();
  /** Open alerts of this shelf. */
  readonly alerts = input<readonly Alert[]>([]);
  /** What it needs for what grows on it. */
  readonly needs = input<readonly ShelfNeed[]>([]);
  readonly day = input.required<BayDay>();

  private readonly session = inject(Session);
  private readonly clock = inject(RoomClock);
  private readonly format = inject(ReaderFormat);

  protected readonly situation = computed(() => shelfSituation(this.shelf()));

  protected readonly strips = computed(() =>
    shelfStrips(this.shelf(), this.session.temperatureUnit(), this.clock.calmNow()),
  );

  protected readonly light = computed(() => {
    const { planned, measured } = this.shelf().now.lampDay;
    const day = this.day();
    return {
      planned: dayParts(planned, day),
      measured: dayParts(measured, day),
      nowMinutes: minuteOfDay(this.clock.calmNow(), day),
      dayMinutes: minuteOfDay(day.endAt, day),
    };
  });

  protected readonly labels = computed(() =>
    this.shelf().plantings.map((planting) => ({ ...planting, note: this.labelNote(planting) })),
  );

  protected readonly plants = computed(() =>
    this.shelf().plantings.map((planting) => ({
      ...plantLook(planting),
      count: planting.count,
      size: plantingSize(planting, this.day().today),
    })),
  );

  protected readonly notes = computed(() => [
    ...this.alerts().map((alert) => {
      const { sentence, tryThis } = this.format.describe(alert, this.shelf().now.lampDay);
      return { id: alert.id, ...alertLook(alert.kind), text: `${sentence} ${tryThis}` };
    }),
    ...this.needs().map(({ id, tone, icon, note }) => ({ id, tone, icon, text: note })),
  ]);

  /** Age or stage; for seed that comes up, how far it is or when to look. */
  private labelNote(planting: PlantingSummary): string {
    const sowing = this.shelf().sowings.find(({ plantingId }) => plantingId === planting.id);
    const coming = sowing === undefined ? null : sowingNote(sowing, this.session.timeZone());
    const words = plantingWords(planting, this.day().today);
    return coming === null ? words : `${words} · ${coming}`;
  }
}
