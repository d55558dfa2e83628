import { ChangeDetectionStrategy, Component } from '@angular/core';
import { RouterLink } from '@angular/router';

/** Shown for an address that leads nowhere. */
@Component({
  selector: 'app-not-found',
  template: `
    <h1>There is nothing at this address</h1>
    <p>The link may be old, or it belongs to a room that you are not a member of.</p>
    <p><a routerLink="/">Go to the room</a></p>
  `,
  imports: [RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class NotFound {}
