import { PiecewiseCubic } from '../table/piecewise-cubic.ts';
import type { Taper } from '../study/schema.ts';

/** The strategy's table ready to be asked; `step` is the ledge in force, kept by the run. */
export class TaperTable {
  readonly shape: Taper['shape'];
  readonly unit: 'A' | 'C' | 'kW';
  /** Soc, or highest cell voltage, at which step k begins; entry 0 is −∞. Empty where there are no ledges. */
  private readonly edges: Float64Array;
  step = 0;

  private readonly values: Float64Array;
  private readonly curve: PiecewiseCubic | null;
  private readonly columns: PiecewiseCubic[];
  private readonly tempC: number[];

  constructor(taper: Taper) {
    this.shape = taper.shape;
    this.unit = taper.shape === 'none' ? 'A' : taper.unit;
    this.edges = edgesOf(taper);
    this.values = Float64Array.from('steps' in taper ? taper.steps.map((step) => step.value) : []);
    this.curve = taper.shape === 'slope' ? curveOf(taper.points) : null;
    this.columns =
      taper.shape === 'map'
        ? taper.tempC.map((_, j) =>
            PiecewiseCubic.linear(
              taper.soc,
              taper.values.map((row) => row[j]),
            ),
          )
        : [];
    this.tempC = taper.shape === 'map' ? taper.tempC : [];
  }

  /** Sets the ledge that holds at plug-in: by soc the last whose edge is reached, by voltage the first. */
  startAt(soc: number): void {
    this.step = 0;
    if (this.shape === 'ledges') while (soc >= this.endSoc) this.step++;
  }

  /** Soc at which the present ledge began; −∞ for the first and where ledges do not stand on soc. */
  get startSoc(): number {
    return this.shape === 'ledges' ? this.edges[this.step] : -Infinity;
  }

  /** Soc at which the next ledge begins; ∞ where there is none. */
  get endSoc(): number {
    return this.shape === 'ledges' ? (this.edges[this.step + 1] ?? Infinity) : Infinity;
  }

  /** Highest cell voltage at which the next ledge begins [V]; ∞ where there is none. */
  get endV(): number {
    return this.shape === 'voltage-ledges' ? (this.edges[this.step + 1] ?? Infinity) : Infinity;
  }

  /** What the table says, in its own unit. */
  value(soc: number, coldestSurface: number): number {
    if (this.values.length > 0) return this.values[this.step];
    if (this.curve !== null) return this.curve.value(soc);
    return this.columns.length > 0 ? this.onMap(soc, coldestSurface) : Infinity;
  }

  private onMap(soc: number, temp: number): number {
    const last = this.tempC.length - 1;
    if (temp <= this.tempC[0]) return this.columns[0].value(soc);
    if (temp >= this.tempC[last]) return this.columns[last].value(soc);
    let j = 0;
    while (temp >= this.tempC[j + 1]) j++;
    const u = (temp - this.tempC[j]) / (this.tempC[j + 1] - this.tempC[j]);
    return (1 - u) * this.columns[j].value(soc) + u * this.columns[j + 1].value(soc);
  }
}

function edgesOf(taper: Taper): Float64Array {
  if (taper.shape === 'ledges')
    return Float64Array.from(taper.steps, (step, k) => (k === 0 ? -Infinity : step.fromSoc));
  if (taper.shape === 'voltage-ledges')
    return Float64Array.from(taper.steps, (_, k) => (k === 0 ? -Infinity : taper.steps[k - 1].untilCellV!));
  return new Float64Array(0);
}

function curveOf(points: { soc: number; value: number }[]): PiecewiseCubic {
  if (points.length === 1) return PiecewiseCubic.constant(points[0].value);
  return PiecewiseCubic.linear(
    points.map((point) => point.soc),
    points.map((point) => point.value),
  );
}
