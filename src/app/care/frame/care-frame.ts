import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { ActivatedRoute, RouterLink, RouterLinkActive, RouterOutlet } from '@angular/router';
import { carePlacesWithin } from '../care-places';

/** The pages about care, with a way from each to the others. */
@Component({
  selector: 'app-care-frame',
  template: `
    <nav aria-label="Care">
      @for (place of places; track place.path) {
        <a
          [routerLink]="place.path === '' ? '/care' : '/care/' + place.path"
          routerLinkActive="current"
          ariaCurrentWhenActive="page"
          [routerLinkActiveOptions]="{ exact: place.path === '' }"
          >{{ place.label }}</a
        >
      }
    </nav>
    <router-outlet />
  `,
  styleUrl: './care-frame.scss',
  imports: [RouterLink, RouterLinkActive, RouterOutlet],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class CareFrame {
  protected readonly places = carePlacesWithin(inject(ActivatedRoute).routeConfig?.children ?? []);
}
