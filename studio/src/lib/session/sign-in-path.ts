type Place = { pathname: string; search: string; hash: string };

/** The sign-in page that leads back to a place, what stands behind ? and # included. */
export function signInPath({ pathname, search, hash }: Place): string {
  return `/sign-in?to=${encodeURIComponent(pathname + search + hash)}`;
}

/**
 * Where to go after signing in.
 *
 * @param to  what the address says; anything but a path of this studio is left aside
 * @returns   null where the address names no page
 */
export function placeAfterSignIn(to: string | null): string | null {
  if (to === null || !/^\/(?![/\\])[^\\]*$/.test(to)) return null;
  return /^\/sign-(in|up)\b/.test(to) ? null : to;
}
