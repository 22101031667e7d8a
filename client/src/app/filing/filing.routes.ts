import { Routes } from '@angular/router';

import { formDefaults } from '../ui/form-defaults';
import { leavesNothingUnsaved } from './leaves-nothing-unsaved';

export const filingRoutes: Routes = [
  {
    path: '',
    providers: [formDefaults],
    children: [
      {
        path: '',
        title: $localize`File a report`,
        loadComponent: () => import('./draft-list/draft-list').then((file) => file.DraftList),
      },
      {
        path: ':draftId',
        title: $localize`File a report`,
        canDeactivate: [leavesNothingUnsaved],
        loadComponent: () => import('./filing-page/filing-page').then((file) => file.FilingPage),
      },
    ],
  },
];

/** The same form over a report that a moderator returned. */
export const changeRoutes: Routes = [
  {
    path: '',
    title: $localize`Change a report`,
    providers: [formDefaults],
    canDeactivate: [leavesNothingUnsaved],
    loadComponent: () => import('./filing-page/filing-page').then((file) => file.FilingPage),
  },
];
