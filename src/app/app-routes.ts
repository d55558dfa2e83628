import type { Routes } from '@angular/router';

/**
 * Every page, loaded when it is first visited. A destination of the same path appears in the navigation as soon
 * as its route stands here.
 */
export const appRoutes: Routes = [
  { path: '**', title: 'Not found', loadComponent: () => import('./not-found').then((m) => m.NotFound) },
];
