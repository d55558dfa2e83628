import { ChangeDetectionStrategy, Component, computed, inject, input, output } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatIcon } from '@angular/material/icon';
import type { Board } from '@shared/contracts/board';
import { formatAge, formatDay, formatTime } from '@shared/format/room-time';
import { RoomClock } from '../../core/room-clock';
import { ThemeChoice } from '../../ui/theme/theme-choice';

/** The room's name, its day and time, and how well it is measured. */
@Component({
  selector: 'app-room-heading',
  templateUrl: './room-heading.html',
  styleUrl: './room-heading.scss',
  imports: [MatButton, MatIcon],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class RoomHeading {
  readonly board = input.required<Board>();
  /** Whether the person may note what they see. */
  readonly mayNote = input(false);

  readonly noteWanted = output();

  private readonly clock = inject(RoomClock);
  private readonly theme = inject(ThemeChoice);

  protected readonly isDark = computed(() => this.theme.shown() === 'lamps-off');

  protected readonly dayAndTime = computed(() => {
    const [now, zone] = [this.clock.calmNow(), this.board().timeZone];
    return `${formatDay(now, zone)}, ${formatTime(now, zone)}`;
  });

  protected readonly equipment = computed(() => {
    const { racks, sensorCount, sensorsReporting } = this.board();
    const shelves = racks.reduce((sum, rack) => sum + rack.shelves.length, 0);
    const sensors =
      sensorsReporting === sensorCount
        ? counted(sensorCount, 'sensor')
        : `${sensorsReporting} of ${sensorCount} sensors`;
    return `${counted(shelves, 'shelf')}, ${sensors} reporting`;
  });

  private readonly lastReadingAt = computed(() =>
    this.board()
      .racks.flatMap(({ shelves }) => shelves)
      .flatMap(({ now }) => now.measures)
      .reduce((latest, { at }) => Math.max(latest, Date.parse(at)), -Infinity),
  );

  protected readonly lastReading = computed(() => {
    const at = this.lastReadingAt();
    return Number.isFinite(at) ? `last reading ${formatAge(at, this.clock.now())}` : 'no reading yet';
  });

  protected toggleView(): void {
    this.theme.toggle();
  }
}

function counted(count: number, noun: 'shelf' | 'sensor'): string {
  const plural = noun === 'shelf' ? 'shelves' : 'sensors';
  return `${count} ${count === 1 ? noun : plural}`;
}
