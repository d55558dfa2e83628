import type { Routes } from '@angular/router';
import { CareFrame } from './frame/care-frame';

/** The pages about care. One appears in the navigation among them as soon as its route stands here. */
export const careRoutes: Routes = [
  {
    path: '',
    component: CareFrame,
    children: [
      {
        path: '',
        pathMatch: 'full',
        title: 'Today’s care',
        loadComponent: () => import('./today/today-page').then((m) => m.TodayPage),
      },
      {
        path: 'rota',
        title: 'Rota',
        loadComponent: () => import('./rota/rota-page').then((m) => m.RotaPage),
      },
      {
        path: 'routines',
        title: 'Routines',
        loadComponent: () => import('./routines/routines-page').then((m) => m.RoutinesPage),
      },
      {
        path: 'routines/new',
        title: 'Add a routine',
        loadComponent: () => import('./routines/form/routine-form-page').then((m) => m.RoutineFormPage),
      },
      {
        path: 'routines/:routineId/change',
        title: 'Change a routine',
        loadComponent: () => import('./routines/form/routine-form-page').then((m) => m.RoutineFormPage),
      },
      {
        path: 'record',
        title: 'Record of care',
        loadComponent: () => import('./record/record-page').then((m) => m.RecordPage),
      },
    ],
  },
];
