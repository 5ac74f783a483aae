const { sqrt } = Math;

// The link between station and pack (engine/MODEL.md, section 5). With A = ΣU_j + ΣΣv_kj [V] and B = ΣR0_j + Rb [Ω]
// the pack's voltage is V = A + B·I, and V·(I_d − I) = P_aux ties the station's current I_d to the pack's I.

/** Current into a pack (A, B) that takes `watts` at its terminals [A]; negative where the pack gives them. */
export function currentForPower(A: number, B: number, watts: number): number {
  return (2 * watts) / (A + sqrt(A * A + 4 * B * watts));
}

/** Pack current that a station current leaves [A], with `aux` taken from the link [W]. */
export function packCurrentFor(A: number, B: number, aux: number, stationCurrent: number): number {
  const s = A + B * stationCurrent;
  const V = 0.5 * (s + sqrt(s * s - 4 * B * aux));
  return stationCurrent - aux / V;
}

/** Pack current at which the station gives `watts`, behind an inlet of `inletOhm` [A]. */
export function packCurrentForStationPower(A: number, B: number, aux: number, inletOhm: number, watts: number): number {
  let I = currentForPower(A, B, watts - aux);
  if (inletOhm === 0) return I;
  // Newton on V·I + aux + Ri·Id² = P: convex and nearly straight in I, so a few rounds reach the last digit.
  for (let round = 0; round < 20; round++) {
    const V = A + B * I;
    const Id = I + aux / V;
    const slope = A + 2 * B * I + 2 * inletOhm * Id * (1 - (aux * B) / (V * V));
    const step = (V * I + aux + inletOhm * Id * Id - watts) / slope;
    I -= step;
    if (step < 1e-10 * (1 + I) && step > -1e-10 * (1 + I)) break;
  }
  return I;
}

/** Pack current at which the inlet stands at `volts` [A], never below what no station current leaves. */
export function packCurrentForStationVoltage(
  A: number,
  B: number,
  aux: number,
  inletOhm: number,
  volts: number,
): number {
  const r = inletOhm / B;
  const b = volts + r * A;
  const disc = b * b - 4 * (1 + r) * inletOhm * aux;
  const V = (b + sqrt(disc < 0 ? 0 : disc)) / (2 * (1 + r));
  const I = (V - A) / B;
  return I + aux / V > 0 ? I : packCurrentFor(A, B, aux, 0);
}

/**
 * Station current of a boost converter fed with `volts` behind an inlet, for `watts` drawn from its input [A];
 * Infinity where no current brings that much.
 */
export function boostInputCurrent(volts: number, inletOhm: number, watts: number): number {
  const disc = volts * volts - 4 * inletOhm * watts;
  // At the most power itself rounding decides the sign.
  if (disc < -1e-9 * volts * volts) return Infinity;
  return (2 * watts) / (volts + sqrt(disc < 0 ? 0 : disc));
}
