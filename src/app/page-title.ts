import { inject, Injectable } from '@angular/core';
import { Title } from '@angular/platform-browser';
import { TitleStrategy, type RouterStateSnapshot } from '@angular/router';

/** Titles the document after the route that is shown, then after the application. */
@Injectable({ providedIn: 'root' })
export class PageTitle extends TitleStrategy {
  private readonly document = inject(Title);

  override updateTitle(snapshot: RouterStateSnapshot): void {
    const page = this.buildTitle(snapshot);
    this.document.setTitle(page === undefined ? 'Lampmeadow' : `${page} – Lampmeadow`);
  }
}
