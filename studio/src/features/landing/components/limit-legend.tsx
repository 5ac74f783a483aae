import { limitSide, type LimitCode } from '@voltiplano/engine';
import { LimitSwatch } from '../../../charts/limit-marks.tsx';
import { limitLabel, limitSides, limitsInOrder } from '../../../charts/limits.ts';

const headings = {
  station: 'Station-side, ruled lines',
  vehicle: 'Vehicle-side, bedding marks',
  cell: 'Cell-side, crossing and closed marks',
} as const;

const what: Record<LimitCode, string> = {
  'station-current': 'the cable and its contacts',
  'station-power': 'the cabinet, alone or shared',
  'station-voltage': 'its highest voltage',
  'station-ramp': 'the rise after plug-in',
  inlet: 'its rating, less when hot',
  'pack-current': 'fuses, busbars, contactors',
  taper: 'the strategy’s own table',
  'cell-voltage': 'the highest cell',
  anode: 'room before plating',
  hot: 'the hottest surface',
  cold: 'the coldest surface',
};

/** The eleven limits, grouped by side. */
export function LimitLegend() {
  return (
    <section className="legend" aria-labelledby="limits-title">
      <h2 id="limits-title">The eleven limits</h2>
      <p className="text-ink2">One colour and one hatch each, on every page, by day and by night.</p>
      <div className="lg">
        {limitSides.map((side) => (
          <div key={side}>
            <h3>{headings[side]}</h3>
            <ul>
              {limitsInOrder
                .filter((code) => limitSide[code] === side)
                .map((code) => (
                  <li key={code}>
                    <LimitSwatch code={code} w={46} h={22} />
                    <span>{limitLabel(code)}</span>
                    <span>{what[code]}</span>
                  </li>
                ))}
            </ul>
          </div>
        ))}
      </div>
    </section>
  );
}
