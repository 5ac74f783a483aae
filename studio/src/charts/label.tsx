import type { ReactNode } from 'react';

type Props = {
  x: number;
  y: number;
  anchor?: 'start' | 'middle' | 'end';
  /** Set in the mono of figures. */
  figure?: boolean;
  /** Keeps the drawing clear around the letters. */
  halo?: boolean;
  ink?: string;
  size?: number;
  weight?: number;
  children: ReactNode;
};

/** Lettering on a drawing. */
export function Label({ x, y, anchor = 'start', figure, halo, ink, size, weight, children }: Props) {
  const className = [figure ? 'n' : '', halo ? 'halo' : ''].join(' ').trim();
  return (
    <text
      x={x}
      y={y}
      textAnchor={anchor}
      className={className || undefined}
      style={{ fill: ink, fontSize: size, fontWeight: weight }}
    >
      {children}
    </text>
  );
}
