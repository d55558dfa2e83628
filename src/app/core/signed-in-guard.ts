import { inject } from '@angular/core';
import {
  RedirectCommand,
  Router,
  type ActivatedRouteSnapshot,
  type CanActivateFn,
  type GuardResult,
} from '@angular/router';
import { catchError, map, of, type Observable } from 'rxjs';
import { returnPath } from './return-path';
import { Session } from './session';

/**
 * Lets people who are signed in pass, and sends others to sign in first; `?room=<id>` chooses the room. While the
 * server can't be asked, a page that says so stands at the same address.
 */
export const signedInGuard: CanActivateFn = (route, { url }) => {
  const router = inject(Router);
  return signedIn(route, url, () => unreachable(router, url));
};

/** The same for pages that work without the server: meanwhile the person whom this device knows may pass. */
export const knownPersonGuard: CanActivateFn = (route, { url }) => {
  const session = inject(Session);
  const router = inject(Router);
  return signedIn(route, url, () => session.resume() !== null || unreachable(router, url));
};

function signedIn(
  route: ActivatedRouteSnapshot,
  url: string,
  withoutAnswer: () => GuardResult,
): Observable<GuardResult> {
  const session = inject(Session);
  const router = inject(Router);
  return session.load().pipe(
    map((account) => {
      if (account === null) return router.createUrlTree(['/sign-in'], { queryParams: { to: url } });
      const roomId = route.queryParamMap.get('room');
      if (roomId !== null) session.chooseRoom(roomId);
      return true;
    }),
    catchError(() => of(withoutAnswer())),
  );
}

function unreachable(router: Router, url: string): RedirectCommand {
  const page = router.createUrlTree(['/unreachable'], { queryParams: { to: url } });
  return new RedirectCommand(page, { skipLocationChange: true });
}

/** Keeps the sign-in page for people who still have to sign in. */
export const signedOutGuard: CanActivateFn = (route) => {
  const session = inject(Session);
  const router = inject(Router);
  return session.load().pipe(
    map((account) => account === null || router.parseUrl(returnPath(route.queryParamMap.get('to')))),
    // The page itself says that the server can't be reached.
    catchError(() => of(true)),
  );
};
