import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { MatIcon } from '@angular/material/icon';
import { RouterLink, RouterLinkActive } from '@angular/router';
import type { Destination } from './destination';

/** One destination in the rail or bar: icon, word, and how much waits there. */
@Component({
  selector: 'app-navigation-link',
  template: `
    <a [routerLink]="destination().link" routerLinkActive="current" ariaCurrentWhenActive="page">
      <mat-icon aria-hidden="true">{{ destination().icon }}</mat-icon>
      <span>{{ destination().label }}</span>
      @if (waiting() > 0) {
        <b aria-hidden="true">{{ waiting() > 99 ? '99+' : waiting() }}</b>
        <span class="read-out-only">, {{ waiting() }} waiting</span>
      }
    </a>
  `,
  styleUrl: './navigation-link.scss',
  imports: [MatIcon, RouterLink, RouterLinkActive],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class NavigationLink {
  readonly destination = input.required<Destination>();
  /** How many things wait there; 0 shows none. */
  readonly waiting = input(0);
}
