const COOKIE = 'voltiplano_csrf=';

/** The token that changing calls repeat, so that the server knows them for the studio's own. */
export function csrfToken(): string | undefined {
  const pair = document.cookie.split('; ').find((one) => one.startsWith(COOKIE));
  return pair?.slice(COOKIE.length);
}
