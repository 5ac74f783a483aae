import { Fragment } from 'react';
import { Label } from '../../../charts/label.tsx';
import { useWidth } from '../../../charts/use-width.ts';
import { formatNumber, formatQuantity } from '../../../lib/format.ts';
import { useUnits } from '../../../lib/units.ts';
import { useCliffSweep, type CliffCell } from '../hooks/use-cliff-sweep.ts';
import { cliffPowersKw, cliffTempsC, rampStep } from '../model/cliff-sweep.ts';

const HEIGHT = 96;
const GUTTER = 58;
/** Start temperatures written under the map [°C]. */
const named = [-16, 16, 40];

/** 135 runs over start temperature and station power, drawn as they come. */
export function CliffMap() {
  const [ref, width] = useWidth<HTMLDivElement>();
  const columns = useCliffSweep();
  const units = useUnits();
  const cellWidth = (width - GUTTER - 1) / cliffTempsC.length;
  const cellHeight = HEIGHT / cliffPowersKw.length;
  const x = (column: number) => GUTTER + column * cellWidth;
  const y = (row: number) => HEIGHT - (row + 1) * cellHeight;
  return (
    <div ref={ref} role="group" aria-label={inWords(columns)}>
      {width > 0 && (
        <svg className="block" width={width} height={HEIGHT + 34} aria-hidden="true">
          {cliffTempsC.map((tempC, i) =>
            cliffPowersKw.map((kw, j) => (
              <Cell
                key={`${tempC} ${kw}`}
                minutes={columns[i]?.[j]}
                x={x(i)}
                y={y(j)}
                width={cellWidth + 0.4}
                height={cellHeight + 0.4}
              />
            )),
          )}
          <rect
            x={GUTTER}
            y={0.5}
            width={Math.max(0, width - GUTTER - 1)}
            height={HEIGHT - 1}
            fill="none"
            stroke="var(--ink)"
          />
          {[50, 150, 250].map((kw) => (
            <Label key={kw} x={GUTTER - 8} y={y((kw - 50) / 25) + cellHeight / 2 + 4} anchor="end" figure>
              {kw === 250 ? '250 kW' : kw}
            </Label>
          ))}
          {cliffTempsC.map((tempC, i) =>
            named.includes(tempC) ? (
              <Fragment key={tempC}>
                <line x1={x(i + 0.5)} x2={x(i + 0.5)} y1={HEIGHT} y2={HEIGHT + 5} stroke="var(--ink)" />
                <Label
                  x={x(i + 0.5)}
                  y={HEIGHT + 20}
                  anchor={i === 0 ? 'start' : i === cliffTempsC.length - 1 ? 'end' : 'middle'}
                  figure
                >
                  {formatNumber(units.temperature(tempC), 0)}
                  {i === 0 && ` ${units.temperatureUnit} at start`}
                </Label>
              </Fragment>
            ) : null,
          )}
        </svg>
      )}
    </div>
  );
}

type CellProps = { minutes: CliffCell; x: number; y: number; width: number; height: number };

/** A cell of the map; a dot where it has not been run. */
function Cell({ minutes, x, y, width, height }: CellProps) {
  if (minutes === undefined) return <circle cx={x + width / 2} cy={y + height / 2} r={1} fill="var(--edge)" />;
  return (
    <rect x={x} y={y} width={width} height={height} fill={`var(--a${rampStep(minutes)})`} shapeRendering="crispEdges" />
  );
}

function inWords(columns: readonly CliffCell[][]): string {
  const minutes = columns.flat().filter((cell) => typeof cell === 'number');
  const head = 'Minutes from 10 to 80 % over start temperature and station power';
  if (minutes.length === 0) return `${head}, being computed`;
  return `${head}: ${formatQuantity('min', Math.min(...minutes))} to ${formatQuantity('min', Math.max(...minutes))} min`;
}
