import { Routes } from '@angular/router';

export const watchRoutes: Routes = [];
