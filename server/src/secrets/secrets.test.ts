import { chmodSync, mkdtempSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { seal, unseal } from './seal.ts';
import { deriveSecrets, loadSecrets } from './secrets.ts';

let dir: string;
beforeEach(() => {
  dir = mkdtempSync(path.join(tmpdir(), 'voltiplano-secrets-'));
});
afterEach(() => {
  rmSync(dir, { recursive: true });
});

const fileMode = () => statSync(path.join(dir, 'secret.key')).mode & 0o777;

describe('loadSecrets', () => {
  it('makes them once, for the owner of the file alone', () => {
    const first = loadSecrets(dir);
    expect(fileMode()).toBe(0o600);
    expect(loadSecrets(dir)).toEqual(first);
    chmodSync(path.join(dir, 'secret.key'), 0o644);
    loadSecrets(dir);
    expect(fileMode()).toBe(0o600);
  });

  it('refuses a damaged file and says what follows from removing it', () => {
    writeFileSync(path.join(dir, 'secret.key'), 'short\n');
    expect(() => loadSecrets(dir)).toThrow(/is damaged: .*everybody is then signed out/);
  });
});

describe('deriveSecrets', () => {
  it('gives each use a key of its own, other for another master', () => {
    const keys = [deriveSecrets(new Uint8Array(32)), deriveSecrets(new Uint8Array(32).fill(1))].flatMap(
      Object.values<Uint8Array>,
    );
    const texts = keys.map((key) => Buffer.from(key).toString('hex'));
    expect(new Set(texts).size).toBe(6);
    for (const text of texts) expect(text).toHaveLength(64);
  });
});

describe('seal', () => {
  const key = new Uint8Array(32).fill(3);

  it('opens again with the same key and context only, and never twice alike', () => {
    const sealed = seal(key, 'mail 1', 'ñandú');
    expect(unseal(key, 'mail 1', sealed)).toBe('ñandú');
    expect(seal(key, 'mail 1', 'ñandú')).not.toEqual(sealed);
    expect(() => unseal(key, 'mail 2', sealed)).toThrow();
    expect(() => unseal(new Uint8Array(32), 'mail 1', sealed)).toThrow();
  });

  it('does not open once a byte was changed, wherever it stands', () => {
    const sealed = seal(key, 'c', 'text');
    for (let i = 0; i < sealed.length; i += 1) {
      const changed = Buffer.from(sealed);
      changed[i] = (changed[i] ?? 0) ^ 1;
      expect(() => unseal(key, 'c', changed)).toThrow();
    }
  });
});
