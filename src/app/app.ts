import { ChangeDetectionStrategy, Component, computed, effect, inject, Injector } from '@angular/core';
import { RouterOutlet } from '@angular/router';
import { appRoutes } from './app-routes';
import { AlertInbox } from './core/alert-inbox';
import { AppUpdate } from './core/app-update';
import { LiveState } from './core/live-state';
import { Session } from './core/session';
import { destinationsWithin } from './destinations';
import { HeadingFocus } from './heading-focus';
import { AppFrame } from './ui/frame/app-frame';
import type { RoomChoice } from './ui/frame/destination';

/** The shell of the application: the frame, and the page that the address names. */
@Component({
  selector: 'app-root',
  template: `
    <app-frame
      accountLink="/account"
      [destinations]="destinations"
      [personName]="personName()"
      [roomName]="roomName()"
      [otherRooms]="otherRooms()"
      [connection]="connection()"
      [badges]="badges()"
      [hasNewVersion]="update.isReady()"
      (roomChosen)="chooseRoom($event)"
      (signOutChosen)="signOut()"
      (reloadChosen)="update.reload()"
    >
      <router-outlet />
    </app-frame>
  `,
  imports: [AppFrame, RouterOutlet],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class App {
  private readonly session = inject(Session);
  private readonly liveState = inject(LiveState);
  private readonly injector = inject(Injector);
  private readonly inbox = inject(AlertInbox);

  protected readonly update = inject(AppUpdate);
  protected readonly destinations = destinationsWithin(appRoutes);
  protected readonly personName = computed(() => this.session.account()?.name ?? null);
  protected readonly roomName = computed(() => this.session.room()?.roomName ?? null);
  protected readonly otherRooms = computed(() =>
    (this.session.account()?.memberships ?? [])
      .filter(({ roomId }) => roomId !== this.session.roomId())
      .map(({ roomId, roomName }) => ({ id: roomId, name: roomName })),
  );
  /** A connection that was never there yet is not missed. */
  protected readonly connection = computed(() => {
    const liveness = this.liveState.now();
    return liveness === 'connecting' ? 'live' : liveness;
  });

  protected readonly badges = computed(() => ({ '/alerts': this.inbox.unseenCount() }));

  constructor() {
    inject(HeadingFocus);
    const whenSignedIn = effect(() => {
      if (this.session.account() === null) return;
      whenSignedIn.destroy();
      // Loaded late: they bring socket.io along, which the first page needs for nothing else.
      void import('./core/alert-feed').then(({ AlertFeed }) => this.injector.get(AlertFeed));
      // Kept on the phone from the first page on, for who walks out of the signal before they open it.
      void import('./core/care/care-today').then(({ CareToday }) => this.injector.get(CareToday));
    });
  }

  protected chooseRoom({ id }: RoomChoice): void {
    this.session.chooseRoom(id);
  }

  protected signOut(): void {
    // Nobody else waits for it: a failure is said by the application's error handler.
    this.session.signOut().subscribe();
  }
}
