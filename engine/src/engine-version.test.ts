import { readFileSync } from 'node:fs';
import { expect, test } from 'vitest';
import { engineVersion } from './engine-version.ts';

test('engineVersion is that of the package', () => {
  const text = readFileSync(new URL('../package.json', import.meta.url), 'utf8');
  expect(engineVersion).toBe((JSON.parse(text) as { version: string }).version);
});
