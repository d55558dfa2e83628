import { ChangeDetectionStrategy, Component, computed, inject, input, output, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatIcon } from '@angular/material/icon';
import { MatInput } from '@angular/material/input';
import { RouterLink } from '@angular/router';
import type { Alert } from '@shared/contracts/alerts';
import { formatDuration } from '@shared/format/room-time';
import { finalize } from 'rxjs';
import { AlertFeed } from '../../core/alert-feed';
import { failureText } from '../../core/failure-text';
import { ReaderFormat } from '../../core/reader-format';
import { RoomClock } from '../../core/room-clock';
import { Session } from '../../core/session';
import { alertLook } from '../../ui/note-line/alert-look';
import { ProblemText } from '../../ui/states/problem-text';

/** One alert: what is wrong, since when, what to try, who was told and who has seen it. */
@Component({
  selector: 'app-alert-card',
  templateUrl: './alert-card.html',
  styleUrl: './alert-card.scss',
  imports: [MatButton, MatFormFieldModule, MatIcon, MatInput, ProblemText, RouterLink],
  host: { '[class]': 'look().tone', '[class.over]': 'isOver()' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AlertCard {
  readonly alert = input.required<Alert>();
  /** Whether the title leads to the alert's own page. */
  readonly isLinked = input(true);
  /** The alert as it is after somebody said that they have seen it. */
  readonly acknowledged = output<Alert>();

  private readonly feed = inject(AlertFeed);
  private readonly format = inject(ReaderFormat);
  private readonly clock = inject(RoomClock);
  private readonly session = inject(Session);

  protected readonly look = computed(() => alertLook(this.alert().kind));
  protected readonly words = computed(() => this.format.describe(this.alert()));
  protected readonly isOver = computed(() => this.alert().clearedAt !== null);
  protected readonly isUrgent = computed(() => this.alert().urgency === 'goNow' && !this.isOver());
  protected readonly facts = computed(() => {
    const { beganAt, endedAt, toldAt, foundLater } = this.alert();
    const lastedMs = (endedAt === null ? this.clock.calmNow() : Date.parse(endedAt)) - Date.parse(beganAt);
    const parts = [
      endedAt === null ? `for ${formatDuration(lastedMs)}` : `lasted ${formatDuration(lastedMs)}`,
    ];
    if (foundLater) parts.push('found later, no mail');
    else parts.push(toldAt === null ? 'nobody was written to' : `mail sent ${this.format.when(toldAt)}`);
    return parts.join(' · ');
  });
  protected readonly seen = computed(() => {
    const { acknowledgedAt, acknowledgedByName, acknowledgeNote } = this.alert();
    if (acknowledgedAt === null) return null;
    const note = acknowledgeNote === '' ? '' : `: “${acknowledgeNote}”`;
    return `Seen by ${acknowledgedByName ?? 'somebody who has left'}, ${this.format.when(acknowledgedAt)}${note}`;
  });
  protected readonly canAcknowledge = computed(
    () => this.alert().acknowledgedAt === null && !this.isOver() && this.session.may('helper'),
  );

  protected readonly isNoting = signal(false);
  protected readonly isSaving = signal(false);
  protected readonly problem = signal<string | null>(null);

  protected acknowledge(note: string): void {
    this.isSaving.set(true);
    this.problem.set(null);
    this.feed
      .acknowledge(this.alert(), note.trim())
      .pipe(finalize(() => this.isSaving.set(false)))
      .subscribe({
        next: (alert) => {
          this.isNoting.set(false);
          this.acknowledged.emit(alert);
        },
        error: (error: unknown) => this.problem.set(failureText(error)),
      });
  }
}
