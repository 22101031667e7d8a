import { Routes } from '@angular/router';

export const handbookRoutes: Routes = [
  {
    path: '',
    title: $localize`Handbook`,
    loadComponent: () => import('./contents/contents').then((file) => file.Contents),
  },
  {
    path: 'tells',
    title: $localize`The tells`,
    loadComponent: () => import('./tells/tells').then((file) => file.Tells),
  },
  {
    path: 'cautions',
    title: $localize`Cautions and the law`,
    loadComponent: () => import('./cautions/cautions').then((file) => file.Cautions),
  },
  {
    path: 'review',
    title: $localize`How reports are reviewed`,
    loadComponent: () => import('./review-guide/review-guide').then((file) => file.ReviewGuide),
  },
  {
    path: 'roles',
    title: $localize`Who may do what`,
    loadComponent: () => import('./roles/roles').then((file) => file.Roles),
  },
];
