export type HeroLayout = {
  phone: boolean;
  height: number;
  /** Page margin at the right, where the power scale is written [px]. */
  edge: number;
  left: number;
  right: number;
  /** The ground line [px]. */
  foot: number;
  endMin: number;
  x: (minute: number) => number;
  y: (kw: number) => number;
};

/** Power at the top of the drawing [kW]; the rulers never come to it. */
const TOP_KW = 212;

/** Scales of the hero. The axis is never shorter than 84 min, so that small changes move the curve, not the scale. */
export function heroLayout(width: number, sessionMin: number): HeroLayout {
  const phone = width < 640;
  const left = phone ? 16 : Math.max(24, (width - 1440) / 2 + 24);
  const right = width - left;
  const top = phone ? 44 : 40;
  const foot = top + (phone ? 230 : 352);
  const endMin = Math.max(84, Math.min(200, sessionMin * 1.03));
  return {
    phone,
    height: foot + 30,
    edge: phone ? 16 : 24,
    left,
    right,
    foot,
    endMin,
    x: (minute) => left + ((right - left) * minute) / endMin,
    y: (kw) => foot - ((foot - top) * kw) / TOP_KW,
  };
}
