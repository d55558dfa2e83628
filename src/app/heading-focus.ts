import { DOCUMENT } from '@angular/common';
import { afterNextRender, inject, Injectable, Injector } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { NavigationEnd, Router } from '@angular/router';
import { filter, map, pairwise } from 'rxjs';

/**
 * Moves the focus to the new page's heading after a navigation, so that a screen reader reads where one is. The first
 * page is left alone: the browser reads that by itself.
 */
@Injectable({ providedIn: 'root' })
export class HeadingFocus {
  private readonly document = inject(DOCUMENT);
  private readonly injector = inject(Injector);

  constructor() {
    inject(Router)
      .events.pipe(
        filter((event) => event instanceof NavigationEnd),
        map(({ urlAfterRedirects }) => urlAfterRedirects.split(/[?#]/, 1)[0]),
        pairwise(),
        // A filter or a zoom kept in the address is no new page.
        filter(([before, now]) => before !== now),
        takeUntilDestroyed(),
      )
      .subscribe(() => afterNextRender(() => this.focusHeading(), { injector: this.injector }));
  }

  private focusHeading(): void {
    const page = this.document.querySelector<HTMLElement>('main');
    const heading = page?.querySelector<HTMLElement>('h1') ?? page;
    heading?.setAttribute('tabindex', '-1');
    heading?.focus({ preventScroll: true });
  }
}
