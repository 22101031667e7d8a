import { Routes } from '@angular/router';

import { formDefaults } from '../ui/form-defaults';
import { QueueStore } from './queue-store';

/** The queue stays on screen while reports open beside it. */
export const reviewRoutes: Routes = [
  {
    path: '',
    title: $localize`Review desk`,
    providers: [formDefaults, QueueStore],
    loadComponent: () => import('./review-desk/review-desk').then((file) => file.ReviewDesk),
    children: [
      {
        path: '',
        pathMatch: 'full',
        loadComponent: () => import('./desk-start/desk-start').then((file) => file.DeskStart),
      },
      {
        path: ':number',
        loadComponent: () => import('./report-desk/report-desk').then((file) => file.ReportDesk),
      },
    ],
  },
];
