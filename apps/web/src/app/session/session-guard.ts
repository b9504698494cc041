import { inject } from '@angular/core';
import { RedirectCommand, Router, type CanActivateFn } from '@angular/router';
import { may, type Permission, type Role } from '#shared/members/permissions';
import { Session } from './session';

/** The page that somebody with these roles begins on. */
export function firstPage(roles: readonly Role[]): string {
  if (may(roles, 'seeFloor')) return '/floor';
  if (may(roles, 'seeOrders')) return '/orders';
  if (may(roles, 'manageApi')) return '/api';
  return '/sessions';
}

/** Only an address inside this app is followed after signing in. */
export function safeNext(next: string | null): string | null {
  return next !== null && /^\/(?![/\\])/.test(next) ? next : null;
}

export const signedIn: CanActivateFn = async (_route, state) => {
  const session = inject(Session);
  const router = inject(Router);
  if (await session.find()) return true;
  return router.createUrlTree(['/sign-in'], {
    queryParams: state.url === '/' ? {} : { next: state.url },
  });
};

export const signedOut: CanActivateFn = async () => {
  const session = inject(Session);
  const router = inject(Router);
  // Whoever cannot reach the server still gets the form, which says so when it is sent.
  const viewer = await session.find().catch(() => null);
  return viewer ? router.parseUrl(firstPage(viewer.member.roles)) : true;
};

export const home: CanActivateFn = async () => {
  const router = inject(Router);
  const viewer = await inject(Session).find();
  return router.parseUrl(viewer ? firstPage(viewer.member.roles) : '/sign-in');
};

/** Shows the page of what is not allowed, at the same address, to whoever may not enter. */
export function mayEnter(permission: Permission): CanActivateFn {
  return async () => {
    const session = inject(Session);
    const router = inject(Router);
    await session.find();
    if (session.may(permission)) return true;
    return new RedirectCommand(router.parseUrl('/forbidden'), { skipLocationChange: true });
  };
}
