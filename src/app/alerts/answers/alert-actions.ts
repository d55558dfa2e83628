import { ChangeDetectionStrategy, Component, computed, inject, input, output, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatIcon } from '@angular/material/icon';
import { MatMenuModule } from '@angular/material/menu';
import type { Alert } from '@shared/contracts/alerts';
import { finalize, type Observable } from 'rxjs';
import { isQuiet } from '../../core/alert-words';
import { newIdempotencyKey } from '../../core/api-client';
import { Notices } from '../../core/notices';
import { ReaderFormat } from '../../core/reader-format';
import { RoomClock } from '../../core/room-clock';
import { RoomMembers } from '../../core/room-members';
import { AlertDesk } from '../alert-desk';
import { QuietPanel } from './quiet-panel';
import { WordsPanel } from './words-panel';

type Panel = 'note' | 'quiet' | 'deed';

/**
 * What somebody can do about an alert, one tap each where a tap is enough, and a way back after each. For whom the role
 * lets.
 */
@Component({
  selector: 'app-alert-actions',
  templateUrl: './alert-actions.html',
  styleUrl: './alert-actions.scss',
  imports: [MatButton, MatIcon, MatMenuModule, QuietPanel, WordsPanel],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AlertActions {
  readonly alert = input.required<Alert>();
  /** What is wrong, for the names of the buttons. */
  readonly subject = input.required<string>();
  readonly changed = output<Alert>();

  private readonly clock = inject(RoomClock);
  private readonly desk = inject(AlertDesk);
  private readonly format = inject(ReaderFormat);
  private readonly notices = inject(Notices);
  protected readonly members = inject(RoomMembers);

  protected readonly panel = signal<Panel | null>(null);
  protected readonly isBusy = signal(false);
  // One for each note: sending it again after a lost answer stores nothing twice.
  private deedKey = newIdempotencyKey();

  protected readonly isOpen = computed(() => this.alert().clearedAt === null);
  protected readonly isSeen = computed(() => this.alert().acknowledgedAt !== null);
  protected readonly isQuiet = computed(() => isQuiet(this.alert(), this.clock.calmNow()));

  protected toggle(panel: Panel): void {
    this.panel.update((shown) => (shown === panel ? null : panel));
  }

  protected acknowledge(note: string): void {
    this.carryOut(this.desk.acknowledge(this.alert(), note), 'Noted: you have seen it', (alert) =>
      this.desk.takeBack(alert),
    );
  }

  protected quiet(until: number): void {
    const words = `Quiet until ${this.format.when(new Date(until).toISOString())}`;
    this.carryOut(this.desk.quiet(this.alert(), until), words, (alert) => this.desk.endQuiet(alert));
  }

  protected noteDeed(text: string): void {
    const known = new Set(this.alert().deeds.map(({ id }) => id));
    const call = this.desk.noteDeed(this.alert(), text, this.deedKey);
    this.carryOut(call, `Noted: “${text}”`, (alert) => {
      const [deed] = alert.deeds.filter(({ id }) => !known.has(id));
      return deed === undefined ? null : this.desk.removeDeed(alert, deed);
    });
  }

  protected assign(personId: string | null, name: string): void {
    const before = this.alert().assignee?.personId ?? null;
    const words = personId === null ? 'Nobody looks after it' : `${name} looks after it`;
    this.carryOut(this.desk.assign(this.alert(), personId), words, (alert) =>
      this.desk.assign(alert, before),
    );
  }

  /** Tells how it went; what was written stays in its field until it is stored. */
  private carryOut(
    call: Observable<Alert>,
    done: string,
    undo: (alert: Alert) => Observable<Alert> | null,
  ): void {
    if (this.isBusy()) return;
    this.isBusy.set(true);
    call.pipe(finalize(() => this.isBusy.set(false))).subscribe({
      next: (alert) => {
        this.panel.set(null);
        this.deedKey = newIdempotencyKey();
        this.changed.emit(alert);
        this.notices.sayUndoable(done).subscribe(() => this.undo(undo(alert)));
      },
      error: (error: unknown) => this.notices.sayFailure(error),
    });
  }

  private undo(call: Observable<Alert> | null): void {
    call?.subscribe({
      next: (alert) => this.changed.emit(alert),
      error: (error: unknown) => this.notices.sayFailure(error),
    });
  }
}
