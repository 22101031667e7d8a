import { Routes } from '@angular/router';

import { requireRole } from '../auth/role-guards';
import { formDefaults } from '../ui/form-defaults';

export const clubRoutes: Routes = [
  {
    path: '',
    title: $localize`Clubs`,
    loadComponent: () => import('./club-list/club-list').then((file) => file.ClubList),
  },
  {
    path: 'new',
    title: $localize`Add a club`,
    canActivate: [requireRole('registrar')],
    providers: [formDefaults],
    loadComponent: () => import('./club-new/club-new').then((file) => file.ClubNew),
  },
  {
    path: ':slug',
    title: $localize`Club`,
    providers: [formDefaults],
    loadComponent: () => import('./club-page/club-page').then((file) => file.ClubPage),
  },
];

export const registryRoutes: Routes = [
  {
    path: 'mail',
    title: $localize`Mail ledger`,
    providers: [formDefaults],
    loadComponent: () => import('./mail-ledger/mail-ledger').then((file) => file.MailLedger),
  },
];
