import { ChangeDetectionStrategy, Component, inject, input, output, viewChild } from '@angular/core';
import { MatIcon } from '@angular/material/icon';
import { MatMenu, MatMenuContent, MatMenuItem } from '@angular/material/menu';
import { RouterLink } from '@angular/router';
import { ThemeChoice } from '../theme/theme-choice';
import type { Destination, RoomChoice } from './destination';

/** The menu of a person: further places, other rooms, the other view, own settings, the way out. */
@Component({
  selector: 'app-person-menu',
  templateUrl: './person-menu.html',
  styleUrl: './person-menu.scss',
  imports: [MatIcon, MatMenu, MatMenuContent, MatMenuItem, RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PersonMenu {
  readonly furtherPlaces = input.required<readonly Destination[]>();
  readonly roomName = input.required<string | null>();
  readonly otherRooms = input.required<readonly RoomChoice[]>();
  readonly accountLink = input.required<string | null>();

  readonly roomChosen = output<RoomChoice>();
  readonly signOutChosen = output();

  /** What a trigger opens. The items stand in the menu's own template, or its arrow keys would not find them. */
  readonly menu = viewChild.required(MatMenu);

  protected readonly theme = inject(ThemeChoice);
}
