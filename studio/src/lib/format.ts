/** Decimals of each quantity on screen (engineering practice of the strips; the ledger shows one more). */
export const decimals = {
  min: 1,
  kW: 1,
  A: 1,
  packV: 0,
  cellV: 3,
  temperature: 1,
  mV: 0,
  distance: 0,
  soc: 0,
  kWh: 1,
  ledgerKwh: 2,
  percent: 1,
} as const;

export type QuantityKind = keyof typeof decimals;

export const NOT_REACHED = 'not reached';

const formatters = new Map<number, Intl.NumberFormat>();

function formatter(digits: number): Intl.NumberFormat {
  const known = formatters.get(digits);
  if (known) return known;
  const made = new Intl.NumberFormat(undefined, {
    minimumFractionDigits: digits,
    maximumFractionDigits: digits,
    useGrouping: false,
    // A value that rounds to nought carries no sign.
    signDisplay: 'negative',
  });
  formatters.set(digits, made);
  return made;
}

/** A number with a fixed count of decimals, the reader's decimal point and a real minus sign. */
export function formatNumber(value: number, digits: number): string {
  return formatter(digits).format(value).replace('-', '\u2212');
}

/**
 * A quantity with its customary decimals; null, a value the session did not come to, reads "not reached".
 *
 * @param value  in the unit shown (soc in %, not as a share)
 */
export function formatQuantity(kind: QuantityKind, value: number | null): string {
  return value === null ? NOT_REACHED : formatNumber(value, decimals[kind]);
}

/** "7 h 19 min", "52 min"; null reads "not reached". */
export function formatHoursAndMinutes(minutes: number | null): string {
  if (minutes === null) return NOT_REACHED;
  const whole = Math.round(minutes);
  const hours = Math.floor(whole / 60);
  return hours === 0 ? `${whole} min` : `${hours} h ${whole - hours * 60} min`;
}

/** Clock time "07:30" from minutes after midnight; past midnight it starts again. */
export function formatClock(minutesAfterMidnight: number): string {
  const whole = ((Math.round(minutesAfterMidnight) % 1440) + 1440) % 1440;
  const twoDigits = (n: number) => String(n).padStart(2, '0');
  return `${twoDigits(Math.floor(whole / 60))}:${twoDigits(whole % 60)}`;
}

/** A share of one as percent, "59" for 0.59. */
export function formatSoc(share: number): string {
  return formatQuantity('soc', share * 100);
}
