import { memo } from 'react';
import { textWidth } from './label-fit.ts';
import { Label } from './label.tsx';
import type { StripLayout } from './strip-layout.ts';

/** Name and unit of each strip: in the left gutter, on a phone above the strip. */
export const StripNames = memo(function StripNames({ layout }: { layout: StripLayout }) {
  if (layout.size === 'phone') return <PhoneNames layout={layout} />;
  return (
    <>
      {layout.strips.map(({ spec, top }) => (
        <StackedName key={spec.key} words={spec.name.split(' ')} unit={spec.unit} top={top} />
      ))}
      <StackedName words={['Limit', 'band']} top={layout.bandTop} />
    </>
  );
});

function StackedName({ words, unit, top }: { words: string[]; unit?: string; top: number }) {
  return (
    <>
      {words.map((word, i) => (
        <text key={word} className="h" x={0} y={top + 11 + i * 15}>
          {word}
        </text>
      ))}
      {unit && (
        <Label x={0} y={top + 11 + words.length * 15}>
          {unit}
        </Label>
      )}
    </>
  );
}

function PhoneNames({ layout }: { layout: StripLayout }) {
  return layout.strips.map(({ spec, top }) => {
    const y = top - (spec.lines.length > 2 ? 28 : 6);
    return (
      <g key={spec.key}>
        <text className="h" x={0} y={y}>
          {spec.name}
        </text>
        <Label x={textWidth(spec.name, 13) + 14} y={y}>
          {spec.unit}
        </Label>
      </g>
    );
  });
}
