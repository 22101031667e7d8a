import { inject } from '@angular/core';
import { CanActivateFn, RedirectCommand, Router } from '@angular/router';
import { map } from 'rxjs';
import { Role } from '#shared/access/audience';

import { SessionStore } from './session-store';

/** Lets anyone signed in pass; others sign in first and come back. */
export const requireSignIn: CanActivateFn = (route, state) => {
  const router = inject(Router);
  return inject(SessionStore)
    .whenKnown()
    .pipe(map((person) => (person ? true : signInFirst(router, state.url))));
};

/**
 * Lets those pass who hold one of the roles in any club. The server decides what they may see;
 * the guard only spares others an empty screen: they get the page of what does not exist.
 */
export function requireRole(...roles: readonly [Role, ...Role[]]): CanActivateFn {
  return (route, state) => {
    const router = inject(Router);
    const session = inject(SessionStore);
    return session.whenKnown().pipe(
      map((person) => {
        if (!person) return signInFirst(router, state.url);
        if (roles.some((role) => session.hasRole(role))) return true;
        return new RedirectCommand(router.parseUrl('/not-found'), { skipLocationChange: true });
      }),
    );
  };
}

/** Filing is for members of a club: others are shown how one becomes a member. */
export const requireMember: CanActivateFn = (route, state) => {
  const router = inject(Router);
  const session = inject(SessionStore);
  return session.whenKnown().pipe(
    map((person) => {
      if (!person) return signInFirst(router, state.url);
      return session.hasRole('member') || router.parseUrl('/handbook/roles');
    }),
  );
};

function signInFirst(router: Router, returnTo: string): RedirectCommand {
  return new RedirectCommand(router.createUrlTree(['/sign-in'], { queryParams: { returnTo } }));
}
