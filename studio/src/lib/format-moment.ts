const DAY_MS = 24 * 60 * 60 * 1000;
const JUST_NOW_MS = 60 * 1000;

const clock = new Intl.DateTimeFormat(undefined, { hour: '2-digit', minute: '2-digit', hourCycle: 'h23' });
const day = new Intl.DateTimeFormat(undefined, { day: 'numeric', month: 'short' });
const dayOfYear = new Intl.DateTimeFormat(undefined, { day: 'numeric', month: 'short', year: 'numeric' });

/**
 * When something was, as short as it is clear: "just now", "12:31", "yesterday 12:31", "2 Nov 12:31", "2 Nov 2025".
 *
 * @param moment  RFC 3339 or milliseconds since 1970; said in the reader's time zone
 */
export function formatMoment(moment: string | number, now = Date.now()): string {
  const at = new Date(moment);
  const today = new Date(now);
  if (Math.abs(now - at.getTime()) < JUST_NOW_MS) return 'just now';
  if (isSameDay(at, today)) return clock.format(at);
  if (isSameDay(at, new Date(now - DAY_MS))) return `yesterday ${clock.format(at)}`;
  return at.getFullYear() === today.getFullYear() ? `${day.format(at)} ${clock.format(at)}` : dayOfYear.format(at);
}

function isSameDay(one: Date, other: Date): boolean {
  return one.toDateString() === other.toDateString();
}
