const HOME = '/projects';

/** The address of the sign-in page that leads back to `path` afterwards. */
export const signInAddress = (path: string): string =>
  path === '/' || path === HOME ? '/sign-in' : `/sign-in?next=${encodeURIComponent(path)}`;

/** Where to go after signing in: a path of this application, never another site. */
export const returnTo = (next: string | null): string =>
  next !== null && /^\/(?![/\\])/.test(next) ? next : HOME;
