import { expect, test } from 'vitest';
import { deviceWords } from './device-words.ts';

const webkit = 'AppleWebKit/537.36 (KHTML, like Gecko)';

test('deviceWords tells browsers from those that they descend from', () => {
  expect(deviceWords(`Mozilla/5.0 (X11; Linux x86_64) ${webkit} Chrome/140.0 Safari/537.36`)).toBe('Chrome on Linux');
  expect(deviceWords(`Mozilla/5.0 (Windows NT 10.0) ${webkit} Chrome/140.0 Safari/537.36 Edg/140.0`)).toBe(
    'Edge on Windows',
  );
  expect(deviceWords('Mozilla/5.0 (X11; Linux x86_64; rv:140.0) Gecko/20100101 Firefox/140.0')).toBe(
    'Firefox on Linux',
  );
  expect(
    deviceWords('Mozilla/5.0 (iPhone; CPU iPhone OS 18_0 like Mac OS X) AppleWebKit/605.1 Version/18.0 Safari/604.1'),
  ).toBe('Safari on iOS');
});

test('deviceWords shows the words of a stranger, and says where there are none', () => {
  expect(deviceWords('charge-script/2')).toBe('charge-script/2');
  expect(deviceWords('')).toBe('Unnamed device');
});
