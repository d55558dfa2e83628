import { ChangeDetectionStrategy, Component, computed, inject, input, output } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatIcon } from '@angular/material/icon';
import { RouterLink } from '@angular/router';
import type { Alert } from '@shared/contracts/alerts';
import { formatDuration } from '@shared/format/room-time';
import { assigneeWords, isQuiet, quietUntilWords, seenWords } from '../../core/alert-words';
import { isSilenceKind } from '../../core/describe-alert';
import { ReaderFormat } from '../../core/reader-format';
import { RoomClock } from '../../core/room-clock';
import { alertLook } from '../../ui/note-line/alert-look';
import type { ShelfNeed } from '../board/shelf-needs';

/** What people have done about an alert so far. */
interface Standing {
  readonly icon: string;
  readonly text: string;
}

/**
 * What is wrong in the room now, the newest first and what is quiet last, with a way to say "I have seen it"; then what
 * shelves need.
 */
@Component({
  selector: 'app-needs-a-look',
  templateUrl: './needs-a-look.html',
  styleUrl: './needs-a-look.scss',
  imports: [MatButton, MatIcon, RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class NeedsALook {
  readonly alerts = input.required<readonly Alert[]>();
  /** What shelves need for what grows on them. */
  readonly needs = input<readonly ShelfNeed[]>([]);
  /** Whether the person may acknowledge. */
  readonly mayAcknowledge = input(false);
  /** Alerts whose acknowledgement is under way. */
  readonly busyIds = input<ReadonlySet<string>>(new Set());

  readonly acknowledged = output<Alert>();

  private readonly format = inject(ReaderFormat);
  private readonly clock = inject(RoomClock);

  protected readonly items = computed(() =>
    [...this.alerts()]
      .sort((one, other) => Number(this.isQuiet(one)) - Number(this.isQuiet(other)))
      .map((alert) => ({
        alert,
        ...alertLook(alert.kind),
        title: this.format.describe(alert).title,
        detail: this.detail(alert),
        standing: this.standing(alert),
      })),
  );

  /** "26 min · peak 29.1 °C · mail sent 14:06" */
  private detail(alert: Alert): string {
    const parts = [formatDuration(this.clock.calmNow() - Date.parse(alert.beganAt))];
    if (!isSilenceKind(alert.kind)) parts.push(`peak ${this.format.value(alert.quantity, alert.peakValue)}`);
    if (alert.toldAt !== null) parts.push(`mail sent ${this.format.when(alert.toldAt)}`);
    return parts.join(' · ');
  }

  private isQuiet(alert: Alert): boolean {
    return isQuiet(alert, this.clock.calmNow());
  }

  private standing(alert: Alert): Standing[] {
    const when = (at: string): string => this.format.when(at);
    const seen = seenWords(alert, when);
    return [
      ...(seen === null ? [] : [{ icon: 'done', text: seen }]),
      ...(this.isQuiet(alert) ? [{ icon: 'notifications_paused', text: quietUntilWords(alert, when) }] : []),
      ...(alert.assignee === null ? [] : [{ icon: 'person', text: assigneeWords(alert.assignee) }]),
    ];
  }
}
