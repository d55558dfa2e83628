import {
  ChangeDetectionStrategy,
  Component,
  computed,
  ElementRef,
  input,
  output,
  viewChild,
} from '@angular/core';
import { MatIcon } from '@angular/material/icon';
import { MatMenuTrigger } from '@angular/material/menu';
import { RouterLink } from '@angular/router';
import type { Connection, Destination, RoomChoice } from './destination';
import { NavigationLink } from './navigation-link';
import { PersonMenu } from './person-menu';

/** A thumb reaches five places on a phone: four destinations and "More". */
const placesOnPhone = 4;

const connectionNotices: Readonly<Record<Connection, string | null>> = {
  live: null,
  reconnecting: 'Reconnecting to the room. Values may be a little old.',
  offline: 'No connection to the room. What you see was true when the connection was lost.',
};

/**
 * The frame around every page: a rail of destinations beside it, or on a phone a bar under it, once someone is signed
 * in; before that only the page.
 */
@Component({
  selector: 'app-frame',
  templateUrl: './app-frame.html',
  styleUrl: './app-frame.scss',
  imports: [MatIcon, MatMenuTrigger, NavigationLink, PersonMenu, RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AppFrame {
  readonly destinations = input.required<readonly Destination[]>();
  /** Who is signed in; null shows no navigation. */
  readonly personName = input.required<string | null>();
  /** Name of the room shown; null when the person has none yet. */
  readonly roomName = input<string | null>(null);
  /** The other rooms that the person may change to. */
  readonly otherRooms = input<readonly RoomChoice[]>([]);
  readonly connection = input<Connection>('live');
  /** How many things wait at a destination, by its link. */
  readonly badges = input<Readonly<Record<string, number>>>({});
  /** Where a person's own settings are; null leaves them out. */
  readonly accountLink = input<string | null>(null);

  /** A newer version of the application waits for a reload. */
  readonly hasNewVersion = input(false);

  readonly signOutChosen = output();
  readonly reloadChosen = output();
  readonly roomChosen = output<RoomChoice>();

  private readonly page = viewChild.required<ElementRef<HTMLElement>>('page');

  protected readonly firstPlaces = computed(() => this.destinations().slice(0, placesOnPhone));
  protected readonly furtherPlaces = computed(() => this.destinations().slice(placesOnPhone));
  protected readonly waitingFurther = computed(() =>
    this.furtherPlaces().reduce((sum, { link }) => sum + this.waitingAt(link), 0),
  );
  protected readonly notice = computed(() => connectionNotices[this.connection()]);
  protected readonly navigationName = computed(() => this.roomName() ?? 'Lampmeadow');

  protected waitingAt(link: string): number {
    return this.badges()[link] ?? 0;
  }

  /** The address stays as it is: the page's base address would turn a plain fragment into another page. */
  protected skipToPage(event: Event): void {
    event.preventDefault();
    this.page().nativeElement.focus();
  }
}
