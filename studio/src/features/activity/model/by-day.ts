import { formatDay } from '../../../lib/moments.ts';

/** Deeds in their order, parted where the reader's calendar day changes. @param now  the reader's clock [ms] */
export function byDay<D extends { at: string }>(deeds: readonly D[], now: number): { day: string; deeds: D[] }[] {
  const days: { day: string; deeds: D[] }[] = [];
  for (const deed of deeds) {
    const day = formatDay(deed.at, new Date(now));
    const last = days.at(-1);
    if (last?.day === day) last.deeds.push(deed);
    else days.push({ day, deeds: [deed] });
  }
  return days;
}
