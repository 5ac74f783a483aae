const COOKIE = 'voltiplano_csrf=';

/** The token that changing calls repeat, so that the server knows them for the studio's own. */
export function csrfToken(): string | undefined {
  const pair = document.cookie.split('; ').find((one) => one.startsWith(COOKIE));
  return pair?.slice(COOKIE.length);
}

/** Drops the token of a session that has ended, so that the next page does not ask who is signed in. */
export function forgetCsrfToken(): void {
  document.cookie = `${COOKIE}; Max-Age=0; Path=/; SameSite=Strict`;
}
