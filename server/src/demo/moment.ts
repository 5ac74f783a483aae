/**
 * When something happened before the start: working days ago at a time of day (`3d 09:40`), or minutes ago (`12m`).
 * So the history reaches up to today, whatever the day, and nobody worked on a Sunday.
 */
export type DemoMoment = `${number}d ${number}:${number}` | `${number}m`;

const MINUTE_MS = 60_000;

/**
 * @param now  the start [ms since 1970-01-01T00:00Z]
 * @returns    the moment in the same unit; times of day are those of the server's time zone
 */
export function momentBefore(now: number, when: DemoMoment): number {
  const minutes = /^(\d+)m$/.exec(when)?.[1];
  if (minutes !== undefined) return now - Number(minutes) * MINUTE_MS;
  const [, days, hour, minute] = /^(\d+)d (\d+):(\d+)$/.exec(when) ?? [];
  if (days === undefined || days === '0') throw new Error(`"${when}" is not a moment before today.`);
  const day = workday(new Date(now), Number(days));
  day.setHours(Number(hour), Number(minute), 0, 0);
  return day.getTime();
}

/** The day so many working days before a day. */
function workday(day: Date, count: number): Date {
  const back = new Date(day);
  for (let left = count; left > 0;) {
    back.setDate(back.getDate() - 1);
    if (back.getDay() !== 0 && back.getDay() !== 6) left -= 1;
  }
  return back;
}
