import { ChangeDetectionStrategy, Component, computed, inject, input, output } from '@angular/core';
import { MatIconButton } from '@angular/material/button';
import { MatIcon } from '@angular/material/icon';
import type { Alert, AlertDeed } from '@shared/contracts/alerts';
import type { Observable } from 'rxjs';
import { Notices } from '../../core/notices';
import { ReaderFormat } from '../../core/reader-format';
import { RoomClock } from '../../core/room-clock';
import { Session } from '../../core/session';
import { AlertDesk } from '../alert-desk';
import { assigneeWords, isQuiet, quietWords, seenWords } from '../../core/alert-words';

/** What people have done about an alert so far, each with the way to take it back for who may. */
@Component({
  selector: 'app-alert-standing',
  templateUrl: './alert-standing.html',
  styleUrl: './alert-standing.scss',
  imports: [MatIcon, MatIconButton],
  host: { '[hidden]': 'isEmpty()' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AlertStanding {
  readonly alert = input.required<Alert>();
  readonly changed = output<Alert>();

  private readonly desk = inject(AlertDesk);
  private readonly format = inject(ReaderFormat);
  private readonly clock = inject(RoomClock);
  private readonly notices = inject(Notices);
  private readonly session = inject(Session);
  private readonly when = (at: string): string => this.format.when(at);

  protected readonly seen = computed(() => seenWords(this.alert(), this.when));
  protected readonly quiet = computed(() =>
    isQuiet(this.alert(), this.clock.calmNow()) ? quietWords(this.alert(), this.when) : null,
  );
  protected readonly assignee = computed(() => {
    const { assignee } = this.alert();
    return assignee === null ? null : assigneeWords(assignee);
  });
  protected readonly deeds = computed(() =>
    this.alert().deeds.map((deed) => ({
      deed,
      words: deed.text,
      by: `${deed.personName ?? 'Somebody who has left'}, ${this.when(deed.at)}`,
      isOwn: this.isOwn(deed.personId),
    })),
  );
  protected readonly isEmpty = computed(
    () =>
      this.seen() === null &&
      this.quiet() === null &&
      this.alert().assignee === null &&
      this.deeds().length === 0,
  );
  protected readonly mayAnswer = computed(() => this.session.may('helper'));
  protected readonly canTakeBack = computed(() => this.isOwn(this.alert().acknowledgedById));

  protected takeBack(): void {
    this.carryOut(this.desk.takeBack(this.alert()), 'Taken back: nobody has seen it');
  }

  protected endQuiet(): void {
    this.carryOut(this.desk.endQuiet(this.alert()), 'Quiet ended: people are written to again');
  }

  protected remove(deed: AlertDeed): void {
    this.carryOut(this.desk.removeDeed(this.alert(), deed), 'Removed');
  }

  /** Helpers take back what is their own, keepers anything. */
  private isOwn(personId: string | null): boolean {
    const isAuthor = personId !== null && personId === this.session.account()?.id;
    return this.session.may('keeper') || (isAuthor && this.session.may('helper'));
  }

  private carryOut(call: Observable<Alert>, done: string): void {
    call.subscribe({
      next: (alert) => {
        this.changed.emit(alert);
        this.notices.say(done);
      },
      error: (error: unknown) => this.notices.sayFailure(error),
    });
  }
}
