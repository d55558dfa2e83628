import { computed, DestroyRef, effect, inject, Injectable, signal, untracked } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import type { Task } from '@shared/contracts/care';
import { firstValueFrom } from 'rxjs';
import { newIdempotencyKey } from '../api-client';
import { ApiFailure } from '../api-failure';
import { LiveConnection } from '../live-connection';
import { Notices } from '../notices';
import { RoomClock } from '../room-clock';
import { Session } from '../session';
import type { CareDeedKind, KeptDeed } from './care-deed';
import { DeedSender } from './deed-sender';
import { deliverInOrder, type Round } from './deliver-in-order';
import { KeptOnPhone } from './kept-on-phone';
import { withWaiting, type ShownTask } from './with-waiting';

/** How long to wait before trying again, each time longer [s]; the last goes on. */
const pausesS = [2, 5, 15, 30, 60];

/**
 * What this person did about care and the server doesn't have yet. Every tick goes through here, with a signal or
 * without: it is kept on the phone first, then sent in order, and sent again until the server has it.
 */
@Injectable({ providedIn: 'root' })
export class CareQueue {
  private readonly kept = inject(KeptOnPhone);
  private readonly sender = inject(DeedSender);
  private readonly session = inject(Session);
  private readonly clock = inject(RoomClock);
  private readonly notices = inject(Notices);
  private readonly held = signal<readonly KeptDeed[]>([]);
  private readonly heldUp = signal(false);
  private readonly personId = computed(() => this.session.account()?.id ?? null);
  private isSending = false;
  private isWantedAgain = false;
  private pauses = 0;
  private retry: ReturnType<typeof setTimeout> | undefined;

  /** What waits to be sent, the oldest first. */
  readonly waiting = computed(() => this.held().filter(({ trouble }) => trouble === null));
  /** What the server did not take, until the person has seen it. */
  readonly troubled = computed(() => this.held().filter(({ trouble }) => trouble !== null));
  /** Whether the last try had no answer, so that what waits does so for a signal. */
  readonly isHeldUp = this.heldUp.asReadonly();
  /** Tasks as the server has them after a deed. */
  readonly taken = this.sender.taken;

  constructor() {
    effect(() => {
      const personId = this.personId();
      untracked(() => void this.changePerson(personId));
    });
    inject(LiveConnection)
      .caughtUp.pipe(takeUntilDestroyed())
      .subscribe(() => this.sendNow());
    const whenVisible = (): void => {
      if (document.visibilityState === 'visible') this.sendNow();
    };
    const whenOnline = (): void => this.sendNow();
    addEventListener('online', whenOnline);
    document.addEventListener('visibilitychange', whenVisible);
    inject(DestroyRef).onDestroy(() => {
      clearTimeout(this.retry);
      removeEventListener('online', whenOnline);
      document.removeEventListener('visibilitychange', whenVisible);
    });
  }

  /** Tasks with what waits laid over them. Reads signals, so templates follow it. */
  shown(tasks: readonly Task[]): readonly ShownTask[] {
    const account = this.session.account();
    return account === null ? [] : withWaiting(tasks, this.waiting(), account);
  }

  /**
   * Keeps a deed and sends it as soon as that can be.
   *
   * @param deed - What was done.
   * @param title - What it is about, in words.
   */
  async add(deed: CareDeedKind, title: string): Promise<KeptDeed> {
    const personId = this.personId();
    const roomId = this.session.roomId();
    if (personId === null || roomId === null) throw new Error('Nobody is signed in');
    const kept = await this.kept.add({
      ...deed,
      title,
      personId,
      roomId,
      key: newIdempotencyKey(),
      at: new Date(this.clock.now()).toISOString(),
      isTried: false,
      failures: 0,
      trouble: null,
    });
    this.held.update((deeds) => [...deeds, kept]);
    this.sendNow();
    return kept;
  }

  /**
   * Takes a task's tick back: one that was never sent is dropped, else the server is told.
   *
   * @param taskId - Which.
   * @param title - What it is about, in words.
   */
  async takeBack(taskId: string, title: string): Promise<void> {
    const personId = this.personId();
    const deeds = personId === null ? [] : await this.kept.of(personId);
    const tick = deeds.findLast(
      (deed) => deed.kind === 'close' && deed.taskId === taskId && deed.trouble === null,
    );
    if (tick === undefined || tick.isTried) await this.add({ kind: 'reopen', taskId }, title);
    else await this.drop(tick);
  }

  /** Drops a deed: one that nothing will become of, or that the person no longer wants. */
  async drop({ order }: KeptDeed): Promise<void> {
    await this.kept.remove(order);
    this.held.update((deeds) => deeds.filter((deed) => deed.order !== order));
  }

  /** Sends a deed once more that the server did not take. */
  async sendAgain(deed: KeptDeed): Promise<void> {
    await this.kept.change({ ...deed, trouble: null, failures: 0 });
    await this.read();
    this.sendNow();
  }

  /** Sends what waits, now. */
  sendNow(): void {
    clearTimeout(this.retry);
    this.pauses = 0;
    void this.send();
  }

  private async send(): Promise<void> {
    if (this.isSending) {
      this.isWantedAgain = true;
      return;
    }
    this.isSending = true;
    try {
      do {
        this.isWantedAgain = false;
        await this.sendRound();
      } while (this.isWantedAgain);
    } finally {
      this.isSending = false;
    }
  }

  private async sendRound(): Promise<void> {
    if (this.waiting().length === 0) {
      this.heldUp.set(false);
      return;
    }
    const round = await this.deliver();
    await this.read();
    this.heldUp.set(!round.isThrough);
    if (round.isThrough) this.pauses = 0;
    else this.tryLater(round.retryAfterS);
  }

  private async deliver(): Promise<Round> {
    const unanswered = { isThrough: false, retryAfterS: null };
    if (!navigator.onLine) return unanswered;
    try {
      // A person that only the phone knows is asked for: without the server's word there is no token to write with.
      const account = await firstValueFrom(this.session.load());
      if (account === null || account.id !== this.personId()) return unanswered;
      return await deliverInOrder(this.kept, account.id, (deed) => this.sender.send(deed));
    } catch (error) {
      if (error instanceof ApiFailure) return unanswered;
      throw error;
    }
  }

  private tryLater(afterS: number | null): void {
    if (this.personId() === null) return;
    const pauseS = afterS ?? pausesS[Math.min(this.pauses, pausesS.length - 1)] ?? 0;
    this.pauses += 1;
    clearTimeout(this.retry);
    this.retry = setTimeout(() => void this.send(), pauseS * 1000);
  }

  private async changePerson(personId: string | null): Promise<void> {
    clearTimeout(this.retry);
    const left = this.waiting().length;
    if (personId === null) {
      this.held.set([]);
      this.heldUp.set(false);
      await this.kept.forgetDays();
      if (left > 0) this.notices.say('What waits here goes out when you sign in on this phone again.');
      return;
    }
    await this.read();
    this.sendNow();
  }

  private async read(): Promise<void> {
    const personId = this.personId();
    const deeds = personId === null ? [] : await this.kept.of(personId);
    if (personId === this.personId()) this.held.set(deeds);
  }
}
