import type { Streams } from './commands.ts';
import type { SweepProgress } from '../worker/index.ts';

const EVERY_MS = 1000;

/** Writes how far a sweep is, at most once a second and at its end. */
export function progressTeller(err: Streams['err'], now: () => number = () => performance.now()) {
  let toldMs = now();
  return ({ total, done, failed, msLeft }: SweepProgress): void => {
    const over = done + failed === total;
    if (!over && now() < toldMs + EVERY_MS) return;
    toldMs = now();
    const left = over || msLeft === null ? '' : `, ${timeText(msLeft)} left`;
    err(`${done + failed} of ${total} cells${failed > 0 ? `, ${failed} failed` : ''}${left}\n`);
  };
}

function timeText(ms: number): string {
  const seconds = Math.ceil(ms / 1000);
  return seconds < 90 ? `${seconds} s` : `${Math.ceil(seconds / 60)} min`;
}
