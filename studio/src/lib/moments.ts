const DAY_MS = 24 * 3_600_000;

const clock = new Intl.DateTimeFormat(undefined, { hour: '2-digit', minute: '2-digit', hourCycle: 'h23' });
const dayOfYear = new Intl.DateTimeFormat(undefined, { day: 'numeric', month: 'long' });
const wholeDay = new Intl.DateTimeFormat(undefined, { day: 'numeric', month: 'long', year: 'numeric' });
const wholeMoment = new Intl.DateTimeFormat(undefined, {
  weekday: 'long',
  day: 'numeric',
  month: 'long',
  year: 'numeric',
  hour: '2-digit',
  minute: '2-digit',
  second: '2-digit',
  hourCycle: 'h23',
  timeZoneName: 'short',
});

/** "14:05", by the reader's clock. */
export function formatClockTime(moment: string): string {
  return clock.format(new Date(moment));
}

/** "today", "yesterday", "3 June", "3 June 2024" in another year. */
export function formatDay(moment: string, now = new Date()): string {
  const date = new Date(moment);
  const daysAgo = Math.round((startOfDay(now) - startOfDay(date)) / DAY_MS);
  if (daysAgo === 0) return 'today';
  if (daysAgo === 1) return 'yesterday';
  return (date.getFullYear() === now.getFullYear() ? dayOfYear : wholeDay).format(date);
}

/** "just now", "12 min ago", "today 11:40", "yesterday", "3 June": as exact as it is worth. */
export function formatAgo(moment: string, now = new Date()): string {
  const minutes = Math.floor((now.getTime() - new Date(moment).getTime()) / 60_000);
  if (minutes < 1) return 'just now';
  if (minutes < 60) return `${minutes} min ago`;
  const day = formatDay(moment, now);
  return day === 'today' ? `today ${formatClockTime(moment)}` : day;
}

/** The moment to the second: "Wednesday, 3 June 2026 at 11:40:12 CEST". */
export function formatWholeMoment(moment: string): string {
  return wholeMoment.format(new Date(moment));
}

function startOfDay(date: Date): number {
  return new Date(date.getFullYear(), date.getMonth(), date.getDate()).getTime();
}
