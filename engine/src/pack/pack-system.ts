import { cellCurves, type CellCurves } from '../cell/cell-curves.ts';
import { CoolantLoop } from '../thermal/coolant-loop.ts';
import type { Cell, Inlet, Pack, Strategy, Thermal } from '../study/schema.ts';
import { INTEGRAL, layoutOf, type Layout } from './layout.ts';

const { exp } = Math;
const {
  battery: BATTERY,
  inlet: INLET,
  auxiliaries: AUXILIARIES,
  busbar: BUSBAR,
  ohmic: OHMIC,
  polarisation: POLARISATION,
  reversible: REVERSIBLE,
  rcPairs: RC_PAIRS,
  chiller: CHILLER,
  radiator: RADIATOR,
  ambient: AMBIENT,
  heater: HEATER,
} = INTEGRAL;
const KELVIN = 273.15;
const T25 = 298.15;
const GAS_CONSTANT = 8.314462618;

export type PackParts = { cell: Cell; pack: Pack; thermal: Thermal; inlet: Inlet; strategy: Strategy };

/**
 * Cells, pack and heat: all that the states decide by themselves, before anything says what current flows.
 *
 * `observe` reads a state vector; what it found stands in the fields until the next call. `rates` turns a current into
 * time derivatives. Both are called thousands of times a run and allocate nothing.
 *
 * Symbols (engine/MODEL.md, sections 3 and 4): n cells in series per segment, M segments, R0 [Ω], τ [s], C [J/K], G [W/K].
 */
export class PackSystem {
  readonly layout: Layout;
  readonly curves: CellCurves;
  readonly coolant: CoolantLoop;
  /** Capacity of the pack [Ah]; cells in series per segment; busbar resistance [Ω]. */
  readonly capacityAh: number;
  readonly cellsPerSegment: number;
  readonly busbarOhm: number;
  readonly zLow: number;
  readonly zSpan: number;
  /** Heat capacity of a segment's core (or only) node and of its surface node [J/K]. */
  readonly coreJPerK: number;
  readonly surfaceJPerK: number;
  /** Conductances per segment [W/K]. */
  readonly coreToSurface: number;
  readonly surfaceToAir: number;
  /** Segment resistances at 25 °C before the soc shape: R0, and one per RC pair [Ω]; time constants [s]. */
  readonly ohmic25: number;
  readonly rc25: Float64Array;
  readonly tau: Float64Array;
  readonly inletOhm: number;
  /** Heat capacity of the inlet [J/K] and its conductance to the air [W/K]. */
  readonly inletJPerK: number;
  readonly inletToAir: number;
  readonly share: number;

  private readonly activation: number;
  private readonly ceilingV: number;
  private readonly marginV: number;
  private readonly guardAnode: boolean;

  /** Ambient [°C], vehicle speed [m/s] and electrical power besides cooling [W]: set for each part of a run. */
  ambientC = 25;
  speed = 0;
  hotelW = 0;

  // What `observe` found. Per segment: factor on resistances, R0 [Ω], rest voltage with RC overvoltage [V], Σ_k v_k [V].
  readonly factor: Float64Array;
  readonly ohmic: Float64Array;
  readonly rest: Float64Array;
  readonly overvoltage: Float64Array;
  soc = 0;
  /** ΣU_j + ΣΣv [V] and ΣR0_j + Rb [Ω]: pack voltage is restV + ohm·I. */
  restV = 0;
  ohm = 0;
  hottestSurface = 0;
  coldestSurface = 0;
  /** Anode potential at rest [V]; n·dU/dT [V/K]. */
  anodeRest = 0;
  entropicVPerK = 0;
  /** Largest currents that keep the voltage ceiling and the anode margin in every segment [A]; may be negative. */
  ceilingCurrent = 0;
  anodeCurrent = 0;
  /** Loop and inlet [°C]; electrical power of all auxiliaries [W]. */
  loopC = 0;
  inletC = 0;
  auxiliaryW = 0;

  /** Current into the pack and through the inlet [A]: whoever decides them sets them before `rates`. */
  current = 0;
  inletCurrent = 0;

  constructor({ cell, pack, thermal, inlet, strategy }: PackParts) {
    const segments = pack.segments;
    const twoNode = thermal.coreToSurfaceWPerK !== undefined;
    const perSegment = pack.series / segments / pack.parallel;
    this.layout = layoutOf(segments, cell.rcPairs.length, twoNode);
    this.curves = cellCurves(cell);
    this.coolant = new CoolantLoop(thermal, segments);
    this.capacityAh = pack.parallel * cell.capacityAh;
    this.cellsPerSegment = pack.series / segments;
    this.busbarOhm = pack.busbarMilliohm / 1000;
    [this.zLow] = pack.socWindow;
    this.zSpan = pack.socWindow[1] - pack.socWindow[0];
    const cells = (cell.massKg * cell.specificHeatJPerKgK * pack.series * pack.parallel) / segments;
    const structure = pack.structureJPerK / segments;
    this.coreJPerK = twoNode ? (1 - thermal.surfaceShare) * cells : cells + structure;
    this.surfaceJPerK = twoNode ? thermal.surfaceShare * cells + structure : 0;
    this.coreToSurface = (thermal.coreToSurfaceWPerK ?? 0) / segments;
    this.surfaceToAir = thermal.ambientWPerK / segments;
    this.ohmic25 = (perSegment * cell.r0Milliohm) / 1000;
    this.rc25 = Float64Array.from(cell.rcPairs, (pair) => (perSegment * pair.rMilliohm) / 1000);
    this.tau = Float64Array.from(cell.rcPairs, (pair) => pair.tauS);
    this.activation = (cell.activationKjPerMol * 1000) / GAS_CONSTANT;
    this.share = cell.anode?.share ?? 0;
    this.inletOhm = inlet.resistanceMilliohm / 1000;
    this.inletJPerK = inlet.heatCapacityJPerK;
    this.inletToAir = inlet.ambientWPerK;
    this.ceilingV = strategy.cellVoltageCeilingV;
    this.guardAnode = strategy.anodeMarginMv !== undefined && this.share > 0;
    this.marginV = (strategy.anodeMarginMv ?? 0) / 1000;
    this.factor = new Float64Array(segments);
    this.ohmic = new Float64Array(segments);
    this.rest = new Float64Array(segments);
    this.overvoltage = new Float64Array(segments);
  }

  /** Reads a state vector; pure but for the fields it fills. */
  observe(y: ArrayLike<number>): void {
    const { core, surface, rc, pairs, segments: M } = this.layout;
    const z = y[0];
    const n = this.cellsPerSegment;
    const ocv = this.curves.ocv.value(z);
    const entropic = this.curves.entropic.value(z);
    const shape = this.curves.shape.value(z);
    const phi = this.curves.anode === null ? 0 : this.curves.anode.value(z);
    const ceiling = n * this.ceilingV;
    const anodeRoom = this.guardAnode ? (n * (phi - this.marginV)) / this.share : Infinity;
    let restV = 0;
    // From 0, not from busbarOhm: a sum that starts at a field V8 keeps tagged is boxed once a segment.
    let ohm = 0;
    let ceilingCurrent = Infinity;
    let anodeCurrent = Infinity;
    let hottest = -Infinity;
    let coldest = Infinity;
    for (let j = 0; j < M; j++) {
      const kelvin = y[core + j] + KELVIN;
      const factor = shape * exp(this.activation * (1 / kelvin - 1 / T25));
      const r0 = this.ohmic25 * factor;
      let v = 0;
      for (let k = 0; k < pairs; k++) v += y[rc + k * M + j];
      const rest = n * (ocv + (kelvin - T25) * entropic) + v;
      this.factor[j] = factor;
      this.ohmic[j] = r0;
      this.overvoltage[j] = v;
      this.rest[j] = rest;
      restV += rest;
      ohm += r0;
      const ceilingAllows = (ceiling - rest) / r0;
      if (ceilingAllows < ceilingCurrent) ceilingCurrent = ceilingAllows;
      const anodeAllows = (anodeRoom - v) / r0;
      if (anodeAllows < anodeCurrent) anodeCurrent = anodeAllows;
      const s = y[surface + j];
      if (s > hottest) hottest = s;
      if (s < coldest) coldest = s;
    }
    this.soc = (z - this.zLow) / this.zSpan;
    this.restV = restV;
    this.ohm = ohm + this.busbarOhm;
    this.ceilingCurrent = ceilingCurrent;
    this.anodeCurrent = anodeCurrent;
    this.hottestSurface = hottest;
    this.coldestSurface = coldest;
    this.anodeRest = phi;
    this.entropicVPerK = n * entropic;
    const coolant = this.coolant;
    this.loopC = y[this.layout.loop];
    this.inletC = y[this.layout.inlet];
    coolant.control(this);
    this.auxiliaryW = this.hotelW + coolant.electricalW;
  }

  /**
   * Writes the time derivatives of the physical states and the pack's own integrals at `current` and `inletCurrent`.
   * `observe` must have read the same state.
   */
  rates(y: ArrayLike<number>, dy: number[]): void {
    const { core, surface, rc, pairs, segments: M, twoNode, loop, inlet, integrals } = this.layout;
    const coolant = this.coolant;
    const I = this.current;
    const inletCurrent = this.inletCurrent;
    const busbar = I * I * this.busbarOhm;
    const air = this.surfaceToAir;
    const ambient = this.ambientC;
    let theta = coolant.inC;
    let ohmic = 0;
    let polarisation = 0;
    let reversible = 0;
    let held = 0;
    let toAir = 0;
    for (let j = 0; j < M; j++) {
      const T = y[core + j];
      const S = y[surface + j];
      const factor = this.factor[j];
      let pol = 0;
      for (let k = 0; k < pairs; k++) {
        const at = rc + k * M + j;
        const v = y[at];
        const r = this.rc25[k] * factor;
        pol += (v * v) / r;
        dy[at] = (I * r - v) / this.tau[k];
      }
      const joule = I * I * this.ohmic[j];
      const entropic = I * (T + KELVIN) * this.entropicVPerK;
      const wall = coolant.wallConductance * (S - theta);
      theta += coolant.effectiveness * (S - theta);
      const loss = air * (S - ambient);
      if (twoNode) {
        const across = this.coreToSurface * (T - S);
        dy[core + j] = (joule + pol + entropic - across) / this.coreJPerK;
        dy[surface + j] = (across + busbar / M - wall - loss) / this.surfaceJPerK;
      } else {
        dy[core + j] = (joule + pol + entropic + busbar / M - wall - loss) / this.coreJPerK;
      }
      ohmic += joule;
      polarisation += pol;
      reversible += entropic;
      held += I * this.overvoltage[j] - pol;
      toAir += loss;
    }
    dy[0] = I / (3600 * this.capacityAh);
    dy[loop] = coolant.reservoirRate(theta, y[loop]);
    const inletHeat = inletCurrent * inletCurrent * this.inletOhm;
    dy[inlet] = (inletHeat - this.inletToAir * (y[inlet] - ambient)) / this.inletJPerK;
    coolant.outC = theta;
    dy[integrals + BATTERY] = (this.restV + this.ohm * I) * I;
    dy[integrals + INLET] = inletHeat;
    dy[integrals + AUXILIARIES] = this.auxiliaryW;
    dy[integrals + BUSBAR] = busbar;
    dy[integrals + OHMIC] = ohmic;
    dy[integrals + POLARISATION] = polarisation;
    dy[integrals + REVERSIBLE] = reversible;
    dy[integrals + RC_PAIRS] = held;
    dy[integrals + CHILLER] = coolant.chillerW;
    dy[integrals + RADIATOR] = coolant.radiatorW;
    dy[integrals + AMBIENT] = toAir;
    dy[integrals + HEATER] = coolant.heaterW;
  }

  /** Highest cell voltage at a current [V]. */
  highestCellV(current: number): number {
    let highest = -Infinity;
    for (let j = 0; j < this.layout.segments; j++) highest = Math.max(highest, this.rest[j] + current * this.ohmic[j]);
    return highest / this.cellsPerSegment;
  }

  /** Lowest cell voltage at a current [V]. */
  lowestCellV(current: number): number {
    let lowest = Infinity;
    for (let j = 0; j < this.layout.segments; j++) lowest = Math.min(lowest, this.rest[j] + current * this.ohmic[j]);
    return lowest / this.cellsPerSegment;
  }

  /** Lowest anode potential at a current [V vs Li/Li⁺]; NaN where the cell has none. */
  lowestAnodeV(current: number): number {
    if (this.curves.anode === null) return Number.NaN;
    let most = -Infinity;
    for (let j = 0; j < this.layout.segments; j++) most = Math.max(most, current * this.ohmic[j] + this.overvoltage[j]);
    return this.anodeRest - (this.share * most) / this.cellsPerSegment;
  }

  /** Temperature of the hottest core in a state [°C]. */
  hottestCore(y: ArrayLike<number>): number {
    const { core, segments } = this.layout;
    let hottest = -Infinity;
    for (let j = 0; j < segments; j++) if (y[core + j] > hottest) hottest = y[core + j]!;
    return hottest;
  }

  /** Coolant leaving the last segment in a state that was observed [°C]. */
  coolantOut(y: ArrayLike<number>): number {
    const { surface, segments } = this.layout;
    let theta = this.coolant.inC;
    for (let j = 0; j < segments; j++) theta += this.coolant.effectiveness * (y[surface + j] - theta);
    return theta;
  }

  /** Fraction of full capacity at a driver's soc. */
  zAt(soc: number): number {
    return this.zLow + this.zSpan * soc;
  }

  /** Energy stored between two states of charge at 25 °C references [J]: a function of z alone. */
  storedJ(zFrom: number, zTo: number): number {
    const { ocv, entropic } = this.curves;
    const volts = ocv.integral(zFrom, zTo) - T25 * entropic.integral(zFrom, zTo);
    return 3600 * this.capacityAh * this.cellsPerSegment * this.layout.segments * volts;
  }
}
