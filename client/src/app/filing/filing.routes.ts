import { Routes } from '@angular/router';

export const filingRoutes: Routes = [];
export const changeRoutes: Routes = [];
