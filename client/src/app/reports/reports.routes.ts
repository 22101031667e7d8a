import { Routes } from '@angular/router';

export const reportRoutes: Routes = [];
export const coinTypeRoutes: Routes = [];
export const myReportRoutes: Routes = [];
