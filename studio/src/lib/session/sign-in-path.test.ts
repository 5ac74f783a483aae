import { expect, test } from 'vitest';
import { placeAfterSignIn, signInPath } from './sign-in-path.ts';

test('signInPath and placeAfterSignIn keep search and hash of a deep link', () => {
  const path = signInPath({ pathname: '/w/a/studies/b', search: '?sort=title&order=asc', hash: '#t=12' });
  const to = new URL(path, 'http://localhost').searchParams.get('to');
  expect(placeAfterSignIn(to)).toBe('/w/a/studies/b?sort=title&order=asc#t=12');
});

test('placeAfterSignIn leads to no other site, and not in a circle', () => {
  for (const to of [null, '', 'https://elsewhere.example/', '//elsewhere.example', '/\\elsewhere.example', 'w/a'])
    expect(placeAfterSignIn(to), String(to)).toBeNull();
  expect(placeAfterSignIn('/sign-in?to=/sign-in')).toBeNull();
  expect(placeAfterSignIn('/sign-up')).toBeNull();
});
