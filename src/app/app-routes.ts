import type { Routes } from '@angular/router';
import { knownPersonGuard, signedInGuard, signedOutGuard } from './core/signed-in-guard';

const signedIn = { canActivate: [signedInGuard] };

/**
 * Every page, loaded when it is first visited. A destination of the same path appears in the navigation as soon
 * as its route stands here.
 */
export const appRoutes: Routes = [
  { path: '', pathMatch: 'full', redirectTo: 'room' },
  {
    path: 'room',
    title: 'Room',
    ...signedIn,
    loadComponent: () => import('./room/room').then((m) => m.Room),
  },
  {
    path: 'shelf/:shelfId',
    title: 'Shelf',
    ...signedIn,
    loadComponent: () => import('./shelf/shelf-page').then((m) => m.ShelfPage),
  },
  {
    path: 'care',
    canActivate: [knownPersonGuard],
    loadChildren: () => import('./care/care-routes').then((m) => m.careRoutes),
  },
  {
    path: 'alerts',
    title: 'Alerts',
    ...signedIn,
    loadComponent: () => import('./alerts/alerts-page').then((m) => m.AlertsPage),
  },
  {
    path: 'alerts/:alertId',
    title: 'Alert',
    ...signedIn,
    loadComponent: () => import('./alerts/alert-page/alert-page').then((m) => m.AlertPage),
  },
  {
    path: 'plantings',
    title: 'Plantings',
    ...signedIn,
    loadComponent: () => import('./plantings/list/plantings-page').then((m) => m.PlantingsPage),
  },
  {
    path: 'plantings/new',
    title: 'Add a planting',
    ...signedIn,
    loadComponent: () => import('./plantings/start/start-page').then((m) => m.StartPage),
  },
  {
    path: 'plantings/labels',
    title: 'Plant labels',
    ...signedIn,
    loadComponent: () => import('./plantings/labels/labels-page').then((m) => m.LabelsPage),
  },
  {
    path: 'plantings/:plantingId',
    title: 'Planting',
    ...signedIn,
    loadComponent: () => import('./plantings/planting/planting-page').then((m) => m.PlantingPage),
  },
  {
    path: 'seed',
    title: 'Seed',
    ...signedIn,
    loadComponent: () => import('./seed/seed-page').then((m) => m.SeedPage),
  },
  {
    path: 'seed/new',
    title: 'Add a packet of seed',
    ...signedIn,
    loadComponent: () => import('./seed/lot-form/lot-form-page').then((m) => m.LotFormPage),
  },
  {
    path: 'seed/:lotId',
    title: 'Seed lot',
    ...signedIn,
    loadComponent: () => import('./seed/lot/lot-page').then((m) => m.LotPage),
  },
  {
    path: 'seed/:lotId/change',
    title: 'Change a seed lot',
    ...signedIn,
    loadComponent: () => import('./seed/lot-form/lot-form-page').then((m) => m.LotFormPage),
  },
  {
    path: 'sowing',
    title: 'Sowing',
    ...signedIn,
    loadComponent: () => import('./sowing/sowing-page').then((m) => m.SowingPage),
  },
  {
    path: 'crops',
    title: 'Crop library',
    ...signedIn,
    loadComponent: () => import('./crops/crops-page').then((m) => m.CropsPage),
  },
  {
    path: 'crops/:cropId',
    title: 'Crop',
    ...signedIn,
    loadComponent: () => import('./crops/crop/crop-page').then((m) => m.CropPage),
  },
  {
    path: 'loggers',
    title: 'Logger files',
    ...signedIn,
    loadComponent: () => import('./loggers/file-list/loggers-page').then((m) => m.LoggersPage),
  },
  {
    path: 'loggers/new',
    title: 'Bring in a file',
    ...signedIn,
    loadComponent: () => import('./loggers/choose-file/choose-file').then((m) => m.ChooseFile),
  },
  {
    path: 'loggers/:fileId',
    title: 'Logger file',
    ...signedIn,
    loadComponent: () => import('./loggers/logger-file-page').then((m) => m.LoggerFilePage),
  },
  {
    path: 'account',
    title: 'Your account',
    ...signedIn,
    loadComponent: () => import('./account/account').then((m) => m.AccountPage),
  },
  {
    path: 'unsubscribe/:token',
    title: 'Stop these mails',
    loadComponent: () => import('./unsubscribe/unsubscribe').then((m) => m.Unsubscribe),
  },
  {
    path: 'sign-in',
    title: 'Sign in',
    canActivate: [signedOutGuard],
    loadComponent: () => import('./sign-in/sign-in').then((m) => m.SignIn),
  },
  {
    path: 'unreachable',
    title: 'No answer',
    loadComponent: () => import('./sign-in/unreachable').then((m) => m.Unreachable),
  },
  { path: '**', title: 'Not found', loadComponent: () => import('./not-found').then((m) => m.NotFound) },
];
