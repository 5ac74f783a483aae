import type { PackSystem } from '../pack/pack-system.ts';
import { studyError } from '../study/study-error.ts';
import type { Boost, Inlet, SessionStudy, Station } from '../study/schema.ts';

const DEFAULT_INLET: Inlet = {
  resistanceMilliohm: 0,
  heatCapacityJPerK: 500,
  ambientWPerK: 4,
  derateFromC: 75,
  derateToC: 90,
};

/** The study's inlet; without one the link has no resistance and no limit of its own. */
export const inletOf = (study: { inlet?: Inlet | undefined }): Inlet => study.inlet ?? DEFAULT_INLET;

/** State of a lone session at plug-in: cells and coolant as given, RC pairs at rest, inlet at ambient. */
export function stateAtPlugIn(system: PackSystem, session: SessionStudy['session']): number[] {
  const { layout } = system;
  const y = new Array<number>(layout.size).fill(0);
  y[0] = system.zLow + session.startSoc * system.zSpan;
  y.fill(session.startTempC, layout.core, layout.rc);
  y[layout.loop] = session.coolantStartC ?? session.startTempC;
  y[layout.inlet] = session.ambientC;
  return y;
}

/**
 * Decides at plug-in whether the session can start and whether through the boost converter.
 *
 * @param restV  pack voltage at rest, ΣU_j + ΣΣv [V]
 * @returns      true where the boost converter is in use
 * @throws {StudyError} `REFUSED` with what stands against it
 */
export function decideBoost(restV: number, station: Station, boost: Boost | undefined): boolean {
  const rest = `the pack rests at ${restV.toFixed(0)} V`;
  if (restV < station.voltageMinV)
    throw studyError(
      'REFUSED',
      'station.voltageMinV',
      'pack-below-station',
      `Cannot start: ${rest}, below this station’s lowest ${station.voltageMinV} V.`,
      station.voltageMinV,
    );
  if (restV <= station.voltageMaxV) return false;
  if (boost) return true;
  const mend = 'Add a boost converter or choose another station.';
  throw studyError(
    'REFUSED',
    'station.voltageMaxV',
    'pack-above-station',
    `Cannot start: ${rest}, above this station’s ${station.voltageMaxV} V. ${mend}`,
    station.voltageMaxV,
  );
}

/**
 * Until the station's current has risen the pack feeds the auxiliaries itself; checks that it can.
 *
 * @throws {StudyError} `REFUSED` with the power asked for and the most the pack gives
 */
export function checkAuxiliaries({ restV, ohm, auxiliaryW }: PackSystem): void {
  const mostW = (restV * restV) / (4 * ohm);
  if (auxiliaryW <= mostW) return;
  const message =
    `Cannot start: at plug-in the pack must feed ${(auxiliaryW / 1000).toFixed(1)} kW of auxiliaries, ` +
    `but at ${(ohm * 1000).toFixed(0)} mΩ it gives ${(mostW / 1000).toFixed(1)} kW at most.`;
  throw studyError('REFUSED', 'cell.r0Milliohm', 'auxiliaries-above-pack', message);
}
