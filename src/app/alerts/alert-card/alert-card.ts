import { ChangeDetectionStrategy, Component, computed, inject, input, output } from '@angular/core';
import { MatIcon } from '@angular/material/icon';
import { RouterLink } from '@angular/router';
import type { Alert } from '@shared/contracts/alerts';
import { ReaderFormat } from '../../core/reader-format';
import { RoomClock } from '../../core/room-clock';
import { Session } from '../../core/session';
import { alertLook } from '../../ui/note-line/alert-look';
import { lastingWords } from '../../core/alert-words';
import { AlertActions } from '../answers/alert-actions';
import { AlertStanding } from '../answers/alert-standing';

/** One alert: what is wrong, since when, what to try, who was told, and what people do about it. */
@Component({
  selector: 'app-alert-card',
  templateUrl: './alert-card.html',
  styleUrl: './alert-card.scss',
  imports: [AlertActions, AlertStanding, MatIcon, RouterLink],
  host: { '[class]': 'look().tone', '[class.over]': 'isOver()' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AlertCard {
  readonly alert = input.required<Alert>();
  /** Whether the title leads to the alert's own page. */
  readonly isLinked = input(true);
  /** The alert as it is after somebody did something about it. */
  readonly changed = output<Alert>();

  private readonly format = inject(ReaderFormat);
  private readonly clock = inject(RoomClock);
  private readonly session = inject(Session);

  protected readonly look = computed(() => alertLook(this.alert().kind));
  protected readonly words = computed(() => this.format.describe(this.alert()));
  protected readonly isOver = computed(() => this.alert().clearedAt !== null);
  protected readonly isUrgent = computed(() => this.alert().urgency === 'goNow' && !this.isOver());
  protected readonly facts = computed(() =>
    lastingWords(this.alert(), this.clock.calmNow(), (at) => this.format.when(at)),
  );
  protected readonly mayAnswer = computed(() => this.session.may('helper'));
}
