import { Routes } from '@angular/router';

import { requireSignIn } from '../auth/role-guards';
import { formDefaults } from '../ui/form-defaults';

/** Placed last in the app: what no other route takes ends on the page of what does not exist. */
export const accountRoutes: Routes = [
  {
    path: '',
    providers: [formDefaults],
    children: [
      {
        path: 'sign-in',
        title: $localize`Sign in`,
        loadComponent: () => import('./sign-in/sign-in').then((file) => file.SignIn),
      },
      {
        path: 'register',
        title: $localize`Open an account`,
        loadComponent: () => import('./register/register').then((file) => file.Register),
      },
      {
        path: 'forgotten-password',
        title: $localize`Forgotten password`,
        loadComponent: () =>
          import('./forgotten-password/forgotten-password').then(
            (file) => file.ForgottenPassword,
          ),
      },
      {
        path: 'password/:token',
        title: $localize`Set a password`,
        loadComponent: () => import('./account-link/account-link').then((file) => file.AccountLink),
      },
      {
        path: 'setup/:token',
        title: $localize`Set up the registry`,
        loadComponent: () => import('./account-link/account-link').then((file) => file.AccountLink),
      },
      {
        path: 'account',
        title: $localize`Name and password`,
        canActivate: [requireSignIn],
        loadComponent: () => import('./account-page/account-page').then((file) => file.AccountPage),
      },
      {
        path: 'notices',
        title: $localize`Notices`,
        canActivate: [requireSignIn],
        loadComponent: () => import('./notices/notices').then((file) => file.Notices),
      },
      {
        path: 'unsubscribe/:token',
        title: $localize`Stop the mail`,
        loadComponent: () => import('./unsubscribe/unsubscribe').then((file) => file.Unsubscribe),
      },
      {
        path: '**',
        title: $localize`Nothing here`,
        loadComponent: () => import('./not-found/not-found').then((file) => file.NotFound),
      },
    ],
  },
];
