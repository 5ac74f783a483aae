import { memo } from 'react';
import { formatHoursAndMinutes, formatNumber } from '../lib/format.ts';
import { Label } from './label.tsx';
import { LimitPatterns, limitFill } from './limit-marks.tsx';
import { limitBedEdge } from './limits.ts';
import { sectionShape, type PowerSection } from './section-shape.ts';
import { sectionWords } from './section-words.ts';

const PREFIX = 'section-';
const HEIGHT = 44;
/** Under the ground: its line and the ticks [px]. */
const FOOT = 4;
/** Over the highest power [px]. */
const AIR = 2;
const DEPTH = 8;
const TICK_EVERY_MIN = 60;

type Props = {
  section: PowerSection;
  /** [px]; stands for `untilMin`. */
  width: number;
  untilMin: number;
};

/**
 * Power over time as a section through the ground, with what held it hanging under the curve: for the row of a list.
 * Its hatches are drawn once per page by `SectionPatterns`.
 */
export const SectionThumbnail = memo(function SectionThumbnail({ section, width, untilMin }: Props) {
  const ground = HEIGHT - FOOT - AIR;
  const shape = sectionShape(section, { untilMin, width, height: ground, depth: DEPTH });
  const foot = AIR + ground;
  const scale = `${formatNumber(shape.scaleKw, 0)} kW`;
  const minutes = Array.from({ length: Math.floor(untilMin / TICK_EVERY_MIN) + 1 }, (_, i) => i * TICK_EVERY_MIN);
  return (
    <svg className="section" width={width} height={HEIGHT} role="img" aria-label={sectionWords(section)}>
      <g transform={`translate(0 ${AIR})`}>
        <path d={shape.ground} fill="var(--ground, var(--sheet))" />
        {shape.beds.map(({ limit, fromMin, path }) => (
          <path key={fromMin} d={path} fill={limitFill(PREFIX, limit)} stroke={limitBedEdge(limit)} strokeWidth={0.8} />
        ))}
        <path d={shape.line} fill="none" stroke="var(--s-power)" strokeWidth={1.5} />
      </g>
      <path d={`M0 ${foot}H${width}`} stroke="var(--ink)" />
      {minutes.map((min) => {
        const x = Math.min(width - 0.5, Math.max(0.5, (width * min) / untilMin));
        return <path key={min} d={`M${x} ${foot}v${FOOT}`} stroke="var(--ink)" />;
      })}
      <path d={`M${width - 0.5} ${AIR}V${foot}`} stroke="var(--rule)" />
      <path d={`M${width - 5} ${AIR + 0.5}h5`} stroke="var(--edge)" />
      <Label x={width - 8} y={shape.isHighAtEnd ? foot - 6 : AIR + 10} anchor="end" ink="var(--ink3)">
        {shape.isCut ? `${scale}, on to ${formatHoursAndMinutes(section.endMin)}` : scale}
      </Label>
    </svg>
  );
});

/** The hatches of all section thumbnails of a page; stands once on it. */
export function SectionPatterns() {
  return (
    <svg width={0} height={0} className="absolute" aria-hidden="true">
      <LimitPatterns prefix={PREFIX} />
    </svg>
  );
}
