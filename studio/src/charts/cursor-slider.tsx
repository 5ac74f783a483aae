import type { KeyboardEvent } from 'react';
import { formatQuantity } from '../lib/format.ts';
import { numberAt, type RowPlace } from './rows.ts';
import type { StripColumns } from './strip-columns.ts';
import type { StripLayout } from './strip-layout.ts';

type Props = {
  layout: StripLayout;
  live: StripColumns;
  place: RowPlace;
  /** What holds the current at the cursor, in words. */
  heldBy: string;
  temperatureUnit: string;
  /** Moves by a share of the visible axis; infinite to its ends. */
  onMove: (share: number) => void;
  /** Below one the visible part narrows about the cursor, above it widens. */
  onZoom: (factor: number) => void;
};

const moves: Record<string, number> = {
  ArrowLeft: -0.005,
  ArrowDown: -0.005,
  ArrowRight: 0.005,
  ArrowUp: 0.005,
  PageDown: -0.1,
  PageUp: 0.1,
  Home: Number.NEGATIVE_INFINITY,
  End: Number.POSITIVE_INFINITY,
};
const zooms: Record<string, number> = { '+': 0.5, '=': 0.5, '-': 2, '0': Number.POSITIVE_INFINITY };

/** The cursor for the keyboard: a slider over the plot area whose text says every reading. */
export function CursorSlider({ layout, live, place, heldBy, temperatureUnit, onMove, onZoom }: Props) {
  const minute = numberAt(live.min, place);
  const onKeyDown = (event: KeyboardEvent) => {
    const move = moves[event.key];
    const zoom = zooms[event.key];
    if ((move === undefined && zoom === undefined) || event.ctrlKey || event.metaKey || event.altKey) return;
    event.preventDefault();
    if (move !== undefined) onMove(event.shiftKey ? move * 10 : move);
    else if (zoom !== undefined) onZoom(zoom);
  };
  const words = [
    `${formatQuantity('min', minute)} min`,
    `${formatQuantity('soc', numberAt(live.socPercent, place))} %`,
    `${formatQuantity('kW', numberAt(live.stationKw, place))} kW at the station`,
    `${formatQuantity('A', numberAt(live.packA, place))} A`,
    `core ${formatQuantity('temperature', numberAt(live.core, place))} ${temperatureUnit}`,
    `held by ${heldBy}`,
  ];
  return (
    <div
      role="slider"
      tabIndex={0}
      aria-label="Cursor over the strips"
      aria-valuemin={0}
      aria-valuemax={Math.round((live.min[live.min.length - 1] ?? 0) * 10) / 10}
      aria-valuenow={Math.round(minute * 10) / 10}
      aria-valuetext={words.join(', ')}
      className="absolute pointer-events-none"
      style={{
        left: layout.left,
        top: layout.plotTop,
        width: layout.right - layout.left,
        height: layout.bandTop + layout.bandHeight - layout.plotTop,
      }}
      onKeyDown={onKeyDown}
    />
  );
}
