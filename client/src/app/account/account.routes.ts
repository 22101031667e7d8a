import { Routes } from '@angular/router';

/** Placed last in the app: what no other route takes ends on the page of what does not exist. */
export const accountRoutes: Routes = [
  {
    path: '**',
    title: $localize`Nothing here`,
    loadComponent: () => import('./not-found/not-found').then((file) => file.NotFound),
  },
];
