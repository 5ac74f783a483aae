const MINUTE_MS = 60_000;
const DAY_MS = 24 * 60 * MINUTE_MS;

/**
 * When something happened, as a register says it: "just now", "12 min ago", "today 11:40", "yesterday 16:05", "3 June",
 * "3 June 2025".
 *
 * @param moment  RFC 3339
 * @param now     the reader's clock [ms]
 */
export function momentText(moment: string, now: number): string {
  const then = new Date(moment);
  const minutes = Math.floor((now - then.getTime()) / MINUTE_MS);
  // A server's clock may be a little ahead.
  if (minutes < 1) return 'just now';
  if (minutes < 60) return `${minutes} min ago`;
  const days = Math.round((dayOf(new Date(now)) - dayOf(then)) / DAY_MS);
  if (days === 0) return `today ${clockText(then)}`;
  if (days === 1) return `yesterday ${clockText(then)}`;
  const isThisYear = then.getFullYear() === new Date(now).getFullYear();
  return then.toLocaleDateString(undefined, {
    day: 'numeric',
    month: 'long',
    ...(isThisYear ? {} : { year: 'numeric' as const }),
  });
}

function dayOf(date: Date): number {
  return new Date(date.getFullYear(), date.getMonth(), date.getDate()).getTime();
}

function clockText(date: Date): string {
  return `${String(date.getHours()).padStart(2, '0')}:${String(date.getMinutes()).padStart(2, '0')}`;
}
