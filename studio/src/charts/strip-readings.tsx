import { formatNumber } from '../lib/format.ts';
import { textWidth } from './label-fit.ts';
import { Label } from './label.tsx';
import { valueAt, type RowPlace } from './rows.ts';
import type { StripColumns } from './strip-columns.ts';
import type { PlacedStrip, StripLayout } from './strip-layout.ts';
import type { LineSpec } from './strip-specs.ts';

type Props = {
  layout: StripLayout;
  live: StripColumns;
  place: RowPlace;
  baseline: StripColumns | null;
  baselinePlace: RowPlace | null;
};

/** Values at the cursor, in line with their strip. */
export function StripReadings(props: Props) {
  if (props.layout.size === 'phone') return <PhoneReadings {...props} />;
  const { layout, baseline } = props;
  const wide = layout.size === 'wide';
  return (
    <>
      <Label x={layout.right + 144} y={layout.plotTop - 10} anchor="end" ink="var(--clay)" weight={600}>
        cursor
      </Label>
      {wide && baseline && (
        <Label x={layout.width} y={layout.plotTop - 10} anchor="end" ink="var(--ink3)">
          base
        </Label>
      )}
      {layout.strips.map((strip) => (
        <MarginReadings key={strip.spec.key} {...props} strip={strip} wide={wide} />
      ))}
    </>
  );
}

function reading(value: number | null, digits: number): string {
  return value === null ? 'none' : formatNumber(value, digits);
}

function MarginReadings(props: Props & { strip: PlacedStrip; wide: boolean }) {
  const { layout, live, place, baseline, baselinePlace, strip, wide } = props;
  const { spec, top } = strip;
  const also = spec.alsoRead;
  const rows = [
    ...spec.lines.map((line) => ({ ...line, digits: spec.digits, inked: line })),
    ...(also ? [{ ...also, inked: null, onBaseline: true }] : []),
  ];
  return rows.map(({ column, label, digits, inked, onBaseline }, i) => {
    const y = top + 11 + i * 17;
    return (
      <g key={column}>
        {inked && (
          <line
            x1={layout.right + (wide ? 14 : 10)}
            x2={layout.right + (wide ? 30 : 22)}
            y1={y - 4}
            y2={y - 4}
            stroke={`var(${inked.ink})`}
            strokeWidth={inked.widthPx}
            strokeDasharray={inked.dash.join(' ') || undefined}
          />
        )}
        <Label x={layout.right + (wide ? 36 : 28)} y={y}>
          {label}
        </Label>
        <Label x={layout.right + 144} y={y} anchor="end" figure ink="var(--ink)">
          {reading(valueAt(live[column], place), digits)}
        </Label>
        {wide && baseline && baselinePlace && onBaseline && (
          <Label x={layout.width} y={y} anchor="end" figure ink="var(--ink3)">
            {reading(valueAt(baseline[column], baselinePlace), digits)}
          </Label>
        )}
      </g>
    );
  });
}

function PhoneReadings({ layout, live, place }: Props) {
  return layout.strips.map(({ spec, top }) => {
    const words = (line: LineSpec) => reading(valueAt(live[line.column], place), spec.digits);
    if (spec.lines.length > 2) {
      const texts = spec.lines.map((line) => `${line.label.split(' ')[0]} ${words(line)}`);
      const starts = texts.map((_, i) => texts.slice(0, i).reduce((sum, text) => sum + textWidth(text) + 26, 0));
      return (
        <g key={spec.key}>
          {spec.lines.map((line, i) => (
            <g key={line.column}>
              <line
                x1={starts[i]}
                x2={starts[i]! + 13}
                y1={top - 14}
                y2={top - 14}
                stroke={`var(${line.ink})`}
                strokeWidth={line.widthPx}
                strokeDasharray={line.dash.join(' ') || undefined}
              />
              <Label x={starts[i]! + 17} y={top - 10} ink={`var(${line.ink})`} size={11.5}>
                {texts[i]}
              </Label>
            </g>
          ))}
        </g>
      );
    }
    const [line] = spec.lines;
    return (
      <Label key={spec.key} x={layout.right} y={top - 6} anchor="end" figure ink={`var(${line!.ink})`}>
        {`${line!.label} ${words(line!)}`}
      </Label>
    );
  });
}
