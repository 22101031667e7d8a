import { Routes } from '@angular/router';

import { formDefaults } from '../ui/form-defaults';

export const watchRoutes: Routes = [
  {
    path: '',
    title: $localize`Watches`,
    providers: [formDefaults],
    loadComponent: () => import('./watch-list/watch-list').then((file) => file.WatchList),
  },
];
