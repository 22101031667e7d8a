import { Routes } from '@angular/router';

import { formDefaults } from '../ui/form-defaults';

export const reportRoutes: Routes = [
  {
    path: '',
    title: $localize`Counterfeit reports`,
    providers: [formDefaults],
    loadComponent: () => import('./report-list/report-list').then((file) => file.ReportList),
  },
  {
    path: ':number',
    title: $localize`Counterfeit report`,
    loadComponent: () => import('./report-page/report-page').then((file) => file.ReportPage),
  },
];

export const coinTypeRoutes: Routes = [
  {
    path: '',
    title: $localize`Coin types`,
    providers: [formDefaults],
    loadComponent: () =>
      import('./coin-type-list/coin-type-list').then((file) => file.CoinTypeList),
  },
  {
    path: ':slug',
    title: $localize`Coin type`,
    loadComponent: () =>
      import('./coin-type-page/coin-type-page').then((file) => file.CoinTypePage),
  },
];

export const myReportRoutes: Routes = [
  {
    path: '',
    title: $localize`My reports`,
    loadComponent: () => import('./my-reports/my-reports').then((file) => file.MyReports),
  },
  {
    path: ':number',
    title: $localize`My report`,
    loadComponent: () => import('./my-report/my-report').then((file) => file.MyReportPage),
  },
];
