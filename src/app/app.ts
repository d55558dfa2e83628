import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import { RouterOutlet } from '@angular/router';
import { appRoutes } from './app-routes';
import { destinationsWithin } from './destinations';
import { HeadingFocus } from './heading-focus';
import { AppFrame } from './ui/frame/app-frame';

/** The shell of the application: the frame, and the page that the address names. */
@Component({
  selector: 'app-root',
  template: `
    <app-frame [destinations]="destinations" [personName]="personName()">
      <router-outlet />
    </app-frame>
  `,
  imports: [AppFrame, RouterOutlet],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class App {
  protected readonly destinations = destinationsWithin(appRoutes);
  protected readonly personName = signal<string | null>(null);

  constructor() {
    inject(HeadingFocus);
  }
}
