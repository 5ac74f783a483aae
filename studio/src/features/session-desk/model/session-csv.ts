import type { SessionResult, SessionSeries, SessionStudyInput } from '@voltiplano/engine';
import { CAUTION } from '../../../components/caution-text.ts';

/** Name and unit of every column, in the order they are written. */
const COLUMNS: Record<keyof SessionSeries, string> = {
  tS: 'time [s]',
  soc: 'soc [-]',
  packCurrentA: 'pack current [A]',
  packVoltageV: 'pack voltage [V]',
  stationVoltageV: 'station voltage [V]',
  stationCurrentA: 'station current [A]',
  stationPowerKw: 'station power [kW]',
  batteryPowerKw: 'battery power [kW]',
  highestCellV: 'highest cell voltage [V]',
  lowestAnodeV: 'lowest anode potential [V]',
  hottestCoreC: 'hottest core [°C]',
  hottestSurfaceC: 'hottest surface [°C]',
  coldestSurfaceC: 'coldest surface [°C]',
  coolantInC: 'coolant in [°C]',
  coolantOutC: 'coolant out [°C]',
  loopC: 'coolant loop [°C]',
  inletC: 'inlet [°C]',
  chillerW: 'chiller heat [W]',
  radiatorW: 'radiator heat [W]',
  heaterW: 'heater heat [W]',
  auxiliaryW: 'auxiliaries [W]',
  limit: 'limit',
};

/**
 * The series of a session as CSV: title, start and cautions as comment lines, then a header with units, then the rows.
 * Decimal points and commas between columns whatever the reader's locale; an empty cell where there is no value.
 */
export function sessionCsv({ series }: SessionResult, study: SessionStudyInput): string {
  const names = Object.keys(COLUMNS) as (keyof SessionSeries)[];
  const head = [
    `# ${study.title ?? 'Session'}`,
    `# ${study.station.name}; ${study.pack.name}; ambient ${study.session.ambientC} °C, start at ${study.session.startTempC} °C`,
    `# ${CAUTION}`,
  ].map((line) => line.replace(/[\r\n]+/g, ' '));
  const rows = series.tS.map((_, row) => names.map((name) => series[name][row] ?? '').join(','));
  return [...head, names.map((name) => COLUMNS[name]).join(','), ...rows, ''].join('\r\n');
}
