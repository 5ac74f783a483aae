import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { makeLogs } from './make-logs.ts';

const LARGEST_BYTES = 300_000;

const logs = makeLogs();
const names = Object.keys(logs);

/** Cells of the rows that begin with a number or a time. */
function rowsOf(name: string, delimiter: string): string[][] {
  const lines = (logs[name] ?? '').split(/\r?\n/);
  return lines.filter((line) => /^\d/.test(line)).map((line) => line.split(delimiter));
}

function minutesOf(clock: string): number {
  const [hours = 0, minutes = 0, seconds = 0] = clock.split(':').map(Number);
  return hours * 60 + minutes + seconds / 60;
}

describe('the invented logs', () => {
  it('are what the script makes, all of them', () => {
    const here = readdirSync(import.meta.dirname).filter((name) => name.endsWith('.csv'));
    expect(here.sort()).toEqual([...names].sort());
    for (const name of names) {
      expect(readFileSync(new URL(name, import.meta.url), 'utf8') === logs[name], `${name}: npm run make-logs`).toBe(
        true,
      );
    }
  });

  it('stay small, and each is told of as invented', () => {
    const readme = readFileSync(new URL('../README.md', import.meta.url), 'utf8');
    expect(readme).toContain('They are invented as well');
    for (const name of names) {
      expect(Buffer.byteLength(logs[name] ?? '')).toBeLessThan(LARGEST_BYTES);
      expect(readme).toContain(`logs/${name}`);
    }
  });

  it('loses 46 s of the bus', () => {
    const seconds = rowsOf('vicuna-tola-logger.csv', ',').map(([time]) => Number(time));
    const gaps = seconds
      .slice(1)
      .flatMap((time, i) => (time - (seconds[i] ?? 0) === 2 ? [] : [time - (seconds[i] ?? 0)]));
    expect(gaps).toEqual([50]);
  });

  it('shows steps and a dark screen on the display', () => {
    const rows = rowsOf('vicuna-quilla-display.csv', ';');
    const dark = rows.filter(([, ...shown]) => shown.every((cell) => cell === ''));
    expect(dark).toHaveLength(15);
    const lit = rows.filter((row) => !dark.includes(row));
    for (const [, soc, power, volts, amperes, energy] of lit) {
      for (const whole of [soc, power, volts, amperes]) expect(whole).toMatch(/^\d+$/);
      expect(energy).toMatch(/^\d+,\d$/);
    }
    expect(minutesOf(lit.at(-1)?.[0] ?? '') - minutesOf(lit[0]?.[0] ?? '')).toBeGreaterThan(60);
  });

  it('has stamps that come twice, and none that goes back', () => {
    const stamps = rowsOf('suri-cima-logger.csv', '\t').map(([stamp = '']) => Date.parse(stamp));
    const differences = stamps.slice(1).map((stamp, i) => stamp - (stamps[i] ?? 0));
    expect(new Set(differences)).toEqual(new Set([0, 1000, 2000]));
    expect(differences.filter((one) => one === 0).length).toBeGreaterThan(3);
  });

  it('misses eleven rows of a cold morning, warmest sensor never below the coldest', () => {
    const rows = rowsOf('vicuna-quirque-cold.csv', '|').map((cells) =>
      cells.map((cell) => Number(cell.replace(',', '.'))),
    );
    const minutes = rows.map(([minute = 0]) => minute);
    const widest = Math.max(...minutes.slice(1).map((minute, i) => minute - (minutes[i] ?? 0)));
    expect(widest * 60).toBeCloseTo(60, 0);
    for (const row of rows) expect(row[4]).toBeGreaterThanOrEqual(row[5] ?? Number.NaN);
  });
});
