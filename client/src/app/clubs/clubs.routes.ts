import { Routes } from '@angular/router';

export const clubRoutes: Routes = [];
export const registryRoutes: Routes = [];
