import { Routes } from '@angular/router';

import { requireMember, requireRole, requireSignIn } from './auth/role-guards';

/** Every screen is fetched when it is first asked for; a feature's own routes set its titles. */
export const routes: Routes = [
  {
    path: '',
    pathMatch: 'full',
    loadComponent: () => import('./home/home').then((file) => file.Home),
  },
  {
    path: 'reports',
    loadChildren: () => import('./reports/reports.routes').then((file) => file.reportRoutes),
  },
  {
    path: 'coin-types',
    loadChildren: () => import('./reports/reports.routes').then((file) => file.coinTypeRoutes),
  },
  {
    path: 'my/reports/:number/change',
    canActivate: [requireRole('member')],
    loadChildren: () => import('./filing/filing.routes').then((file) => file.changeRoutes),
  },
  {
    path: 'my/reports',
    canActivate: [requireSignIn],
    loadChildren: () => import('./reports/reports.routes').then((file) => file.myReportRoutes),
  },
  {
    path: 'file',
    canActivate: [requireMember],
    loadChildren: () => import('./filing/filing.routes').then((file) => file.filingRoutes),
  },
  {
    path: 'review',
    canActivate: [requireRole('moderator')],
    loadChildren: () => import('./review/review.routes').then((file) => file.reviewRoutes),
  },
  {
    path: 'watches',
    canActivate: [requireSignIn],
    loadChildren: () => import('./watches/watches.routes').then((file) => file.watchRoutes),
  },
  {
    path: 'clubs',
    canActivate: [requireSignIn],
    loadChildren: () => import('./clubs/clubs.routes').then((file) => file.clubRoutes),
  },
  {
    path: 'registry',
    canActivate: [requireRole('registrar')],
    loadChildren: () => import('./clubs/clubs.routes').then((file) => file.registryRoutes),
  },
  {
    path: 'handbook',
    loadChildren: () => import('./handbook/handbook.routes').then((file) => file.handbookRoutes),
  },
  {
    path: '',
    loadChildren: () => import('./account/account.routes').then((file) => file.accountRoutes),
  },
];
