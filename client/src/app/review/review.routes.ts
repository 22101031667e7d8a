import { Routes } from '@angular/router';

export const reviewRoutes: Routes = [];
