import { Routes } from '@angular/router';

export const handbookRoutes: Routes = [];
