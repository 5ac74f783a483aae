/** What a person needs to know to type one numeric input, and what the schema holds it to. */
export type Quantity = {
  /** Plain name on screen. */
  label: string;
  /** Unit as written in the study file; '' for a pure number or a fraction. */
  unit: string;
  /** Least and greatest value allowed. */
  min: number;
  max: number;
  /** True where the least value itself is refused (a quantity that must be above it). */
  above?: true;
  integer?: true;
  /** Usual range in practice, and where it comes from. */
  usual?: readonly [number, number];
  source?: string;
  /** What it is, in a sentence or two. */
  what: string;
};

const PRACTICE = 'common practice, no published source';

/**
 * Every numeric input of a session study by its path, `[]` standing for any row.
 * One table feeds the schema's ranges, the JSON Schema's descriptions, and the help beside each input.
 */
export const quantities = {
  'cell.capacityAh': q('Capacity', 'Ah', 0, 5000, 'Full capacity of one cell, from z = 0 to z = 1.', [2, 200], PRACTICE, 'above'),
  'cell.massKg': q('Mass', 'kg', 0, 200, 'Mass of one cell.', [0.05, 3], PRACTICE, 'above'),
  'cell.specificHeatJPerKgK': q('Specific heat', 'J/kg/K', 100, 5000, 'Heat taken by a kilogram of cell per kelvin.', [800, 1100], 'survey, Steinhardt et al., J. Power Sources 522 (2022) 230829'),
  'cell.r0Milliohm': q('Resistance, at once', 'mΩ', 0, 1000, 'Ohmic resistance of one cell at 25 °C, the part of the overvoltage that follows the current at once.', [0.3, 30], '10 s resistance × capacity lies between 60 and 200 mΩ·Ah for common cells (from memory)', 'above'),
  'cell.rcPairs[].rMilliohm': q('RC resistance', 'mΩ', 0, 1000, 'Resistance of one RC pair at 25 °C, the part of the overvoltage that comes with time.', [0.1, 20], PRACTICE, 'above'),
  'cell.rcPairs[].tauS': q('RC time constant', 's', 0.05, 100000, 'Time constant of one RC pair; it does not change with temperature.', [5, 300], PRACTICE),
  'cell.activationKjPerMol': q('Activation energy', 'kJ/mol', 0, 120, 'How steeply resistance falls as the cell warms (Arrhenius); 0 is no dependence.', [18, 35], 'fits LFP HPPC data of ARTS-Lab at 21 to 23 kJ/mol'),
  'cell.anode.share': q('Anode share of overvoltage', '', 0, 1, "The negative electrode's part of the cell's polarisation.", [0.3, 0.6], PRACTICE),
  'cell.vMaxV': q('Cell voltage, highest allowed', 'V', 0.5, 10, 'The cell maker’s highest voltage. The strategy’s ceiling may not pass it.', [3.6, 4.3], PRACTICE),
  'cell.vMinV': q('Cell voltage, lowest allowed', 'V', 0, 10, 'The cell maker’s lowest voltage; driving stops there.', [2, 3], PRACTICE),
  'pack.series': q('Cells in series', '', 1, 2000, 'Cells, or groups of parallel cells, one after another.', [90, 220], PRACTICE, 'integer'),
  'pack.parallel': q('Cells in parallel', '', 1, 2000, 'Cells side by side in each group.', [1, 80], PRACTICE, 'integer'),
  'pack.socWindow[]': q('Usable window', 'of z', 0, 1, 'Share of the full capacity at the driver’s 0 % and 100 %.', [0.02, 0.98], PRACTICE),
  'pack.busbarMilliohm': q('Busbars and contactors', 'mΩ', 0, 1000, 'Resistance of everything in the pack that is not a cell.', [2, 20], PRACTICE),
  'pack.chargeCurrentMaxA': q('Charge current, most', 'A', 0, 20000, 'Most current the pack’s fuses, busbars and contactors take while charging.', [200, 600], PRACTICE, 'above'),
  'pack.dischargeCurrentMaxA': q('Discharge current, most', 'A', 0, 20000, 'Most current the pack gives while driving.', [400, 1500], PRACTICE, 'above'),
  'pack.structureJPerK': q('Structure heat capacity', 'J/K', 0, 1e8, 'Heat capacity of the plate, housing and other parts that warm with the surfaces.', [10000, 80000], PRACTICE),
  'pack.segments': q('Segments along the coolant', '', 1, 400, 'Equal parts of the pack that the coolant passes one after another.', [1, 12], PRACTICE, 'integer'),
  'thermal.coreToSurfaceWPerK': q('Core to surface', 'W/K', 0, 1e6, 'Conductance between the cells’ cores and their surfaces, whole pack. Leave empty for one node per segment.', [200, 2000], PRACTICE, 'above'),
  'thermal.surfaceShare': q('Surface share of mass', '', 0, 0.95, 'Share of the cells’ mass that counts to the surface node.', [0.05, 0.2], PRACTICE),
  'thermal.plateWPerK': q('Plate conductance (UA)', 'W/K', 0, 1e6, 'Conductance from the surfaces to the coolant, whole pack.', [200, 2000], PRACTICE),
  'thermal.ambientWPerK': q('Surface to air', 'W/K', 0, 1e5, 'Conductance from the surfaces to the air, whole pack.', [3, 20], PRACTICE),
  'thermal.coolant.flowLPerMin': q('Coolant flow', 'L/min', 0, 1000, 'Coolant through the plates; 0 is no cooling.', [5, 25], PRACTICE),
  'thermal.coolant.densityKgPerM3': q('Coolant density', 'kg/m³', 500, 2000, 'Density of the coolant.', [1055, 1090], '50 mass-% ethylene glycol–water: 1090 at 0 °C, 1055 at 60 °C (ASHRAE Fundamentals, from memory)'),
  'thermal.coolant.specificHeatJPerKgK': q('Coolant specific heat', 'J/kg/K', 500, 6000, 'Specific heat of the coolant.', [3280, 3400], '50 vol-% glycol: 3280 at 20 °C, 3360 at 40 °C (ASHRAE Fundamentals, from memory)'),
  'thermal.coolant.volumeL': q('Coolant volume', 'L', 0, 1000, 'Coolant in the whole loop.', [4, 15], PRACTICE, 'above'),
  'thermal.pumpW': q('Pump', 'W', 0, 20000, 'Electrical power of the coolant pump.', [30, 150], PRACTICE),
  'thermal.chiller.ratedW': q('Chiller, rated', 'W', 0, 200000, 'Most heat the chiller takes from the coolant.', [2000, 8000], PRACTICE),
  'thermal.chiller.onC': q('Chiller starts at', '°C', -40, 100, 'Hottest surface at which the chiller starts.', [24, 34], PRACTICE),
  'thermal.chiller.fullC': q('Chiller full at', '°C', -40, 120, 'Hottest surface at which the chiller runs at its most.', [30, 42], PRACTICE),
  'thermal.chiller.minCoolantC': q('Chiller stops at coolant', '°C', -40, 60, 'Coldest coolant the chiller makes.', [5, 15], PRACTICE),
  'thermal.chiller.cop35': q('COP at 35 °C', '', 0.1, 20, 'Heat moved per electricity used, in air of 35 °C.', [1.8, 3], PRACTICE),
  'thermal.chiller.copPerK': q('COP, gain per kelvin below 35 °C', '1/K', 0, 1, 'How much the COP rises per kelvin of cooler air.', [0.02, 0.05], PRACTICE),
  'thermal.chiller.deratePerKAbove35': q('Chiller loss per kelvin above 35 °C', '1/K', 0, 1, 'Share of the rated power lost per kelvin of hotter air.', [0.005, 0.02], PRACTICE),
  'thermal.radiator.parkedWPerK': q('Radiator, parked', 'W/K', 0, 1e5, 'Radiator conductance at a stand.', [30, 150], PRACTICE),
  'thermal.radiator.perMpsWPerK': q('Radiator, per m/s', 'W/K', 0, 1e4, 'Conductance gained per m/s of driving.', [5, 20], PRACTICE),
  'thermal.radiator.onC': q('Radiator opens at', '°C', -40, 100, 'Hottest surface at which coolant is sent to the radiator.', [22, 30], PRACTICE),
  'thermal.radiator.fullC': q('Radiator full at', '°C', -40, 120, 'Hottest surface at which all of it is used.', [28, 38], PRACTICE),
  'thermal.heater.ratedW': q('Heater, rated', 'W', 0, 100000, 'Electrical power of the coolant heater.', [3000, 7000], PRACTICE),
  'thermal.heater.efficiency': q('Heater efficiency', '', 0, 1, 'Heat to the coolant per electricity.', [0.9, 0.98], PRACTICE, 'above'),
  'thermal.heater.onC': q('Heater full at', '°C', -60, 80, 'Coldest surface at or below which the heater runs at its most.', [0, 15], PRACTICE),
  'thermal.heater.offC': q('Heater off at', '°C', -60, 100, 'Coldest surface from which the heater is off.', [8, 25], PRACTICE),
  'thermal.heater.maxCoolantC': q('Heater, hottest coolant', '°C', 0, 100, 'The heater fades out over the last 5 K below this coolant temperature.', [45, 65], PRACTICE),
  'inlet.resistanceMilliohm': q('Resistance', 'mΩ', 0, 100, 'Both contacts of the inlet and its cables to the pack.', [0.1, 1], PRACTICE),
  'inlet.heatCapacityJPerK': q('Heat capacity', 'J/K', 0, 1e6, 'Heat capacity of the contacts.', [300, 1500], PRACTICE, 'above'),
  'inlet.ambientWPerK': q('Inlet to air', 'W/K', 0, 1e4, 'Conductance from the contacts to the air.', [2, 8], PRACTICE),
  'inlet.currentMaxA': q('Inlet current, most', 'A', 0, 20000, 'Rating of the inlet. Leave empty for no limit.', [200, 500], 'IEC TS 62196-3-1:2020: 500 A with thermal sensing', 'above'),
  'inlet.derateFromC': q('Inlet derates from', '°C', -20, 200, 'Contact temperature from which the current is brought down.', [70, 80], PRACTICE),
  'inlet.derateToC': q('Inlet derates to', '°C', -20, 250, 'Contact temperature at which no current is left.', [85, 95], 'contact limit 90 °C, IEC 61851-23 (from memory)'),
  'station.powerMaxKw': q('Power, most', 'kW', 0, 10000, 'Most power of the station at its outlet.', [50, 400], 'power classes 50 to 350 kW (from memory)', 'above'),
  'station.currentMaxA': q('Current, most', 'A', 0, 20000, 'Most current of the station’s cable.', [125, 500], 'CCS: 500 A', 'above'),
  'station.voltageMinV': q('Voltage, lowest', 'V', 0, 5000, 'A pack resting below this cannot start.', [150, 200], 'power classes: 200 to 920 V (from memory)'),
  'station.voltageMaxV': q('Voltage, highest', 'V', 1, 5000, 'Highest voltage of the station.', [500, 1000], 'CCS: 1000 V', 'above'),
  'station.rampAPerS': q('Ramp', 'A/s', 0, 100000, 'How fast the current may rise after plug-in.', [20, 200], 'at least 20 A/s, IEC 61851-23:2014 (from memory)', 'above'),
  'station.rectifierEfficiency': q('Rectifier efficiency', '', 0, 1, 'Outlet power per grid power.', [0.93, 0.97], PRACTICE, 'above'),
  'station.powerSteps[].atMin': q('From minute', 'min', 0, 100000, 'Minute since plug-in from which this power holds.', [0, 60], PRACTICE),
  'station.powerSteps[].powerKw': q('Power shared', 'kW', 0, 10000, 'Power left for this car from that minute on.', [0, 400], PRACTICE),
  'boost.powerMaxKw': q('Boost power, most', 'kW', 0, 10000, 'Most power of the vehicle’s converter, at its pack side.', [50, 170], PRACTICE, 'above'),
  'boost.efficiency': q('Boost efficiency', '', 0, 1, 'Pack-side power per station power.', [0.95, 0.99], PRACTICE, 'above'),
  'strategy.cellVoltageCeilingV': q('Voltage ceiling, cell', 'V', 0.5, 10, 'Highest cell voltage the strategy allows; never above the cell’s own.', [3.55, 4.2], PRACTICE),
  'strategy.anodeMarginMv': q('Anode margin', 'mV', -500, 500, 'Least anode potential against lithium. Leave empty to leave it unguarded.', [0, 40], 'criterion: at least 0 V vs Li/Li⁺ (Waldmann et al. 2014, from memory)'),
  'strategy.hotDerate.fromC': q('Hot limit from', '°C', -40, 150, 'Hottest surface from which the current is brought down.', [38, 48], PRACTICE),
  'strategy.hotDerate.toC': q('Hot limit to', '°C', -40, 200, 'Hottest surface at which no current is left. Cores may be hotter than surfaces.', [48, 60], PRACTICE),
  'strategy.coldLimit.tempC[]': q('Coldest surface', '°C', -60, 100, 'Coldest surface of this row.', [-20, 30], PRACTICE),
  'strategy.coldLimit.cRate[]': q('C-rate allowed', 'C', 0, 100, 'Current allowed at that temperature, as a multiple of the capacity per hour.', [0, 3], PRACTICE),
  'strategy.cutoffA': q('End current', 'A', 0, 20000, 'The session ends when ceiling, taper or anode margin hold the current at or below this.', [2, 30], PRACTICE),
  'strategy.taper.value': q('Taper value', 'A, C or kW', 0, 100000, 'What the strategy allows there.', [0, 600], PRACTICE),
  'strategy.taper.soc': q('Soc', '', 0, 1, 'State of charge as the driver sees it.', [0, 1], PRACTICE),
  'strategy.taper.steps[].untilCellV': q('Until cell voltage', 'V', 0.5, 10, 'Highest cell voltage at which the next step begins.', [3.5, 4.2], PRACTICE),
  'strategy.taper.tempC[]': q('Coldest surface', '°C', -60, 100, 'Coldest surface of this column.', [-20, 50], PRACTICE),
  'session.ambientC': q('Ambient', '°C', -60, 70, 'Air around the pack, the inlet and the radiator.', [-20, 40], PRACTICE),
  'session.startSoc': q('Start soc', '', 0, 1, 'State of charge at plug-in.', [0, 0.3], PRACTICE),
  'session.startTempC': q('Start temperature', '°C', -40, 80, 'All cells at plug-in. Outside this window the model, like the cells, is not to be used.', [-10, 40], PRACTICE),
  'session.coolantStartC': q('Coolant at start', '°C', -40, 100, 'Loop at plug-in. Leave empty for the start temperature.', [-10, 40], PRACTICE),
  'session.targetSoc': q('Target soc', '', 0, 1, 'The session ends there.', [0.8, 1], PRACTICE),
  'session.maxMin': q('Longest session', 'min', 0, 10000, 'The session ends then, whatever was reached.', [60, 240], PRACTICE, 'above'),
  'session.hotelW': q('Vehicle at rest', 'W', 0, 50000, 'Electronics and cabin while charging.', [200, 2000], PRACTICE),
  'session.whPerKm': q('Consumption', 'Wh/km', 0, 5000, 'Turns energy into kilometres; it changes nothing else.', [130, 300], PRACTICE, 'above'),
  'vehicle.massKg': q('Mass', 'kg', 0, 100000, 'Vehicle with load.', [1500, 3500], PRACTICE, 'above'),
  'vehicle.dragAreaM2': q('Drag area (CdA)', 'm²', 0, 50, 'Drag coefficient times frontal area.', [0.5, 1.2], PRACTICE),
  'vehicle.rollingCoefficient': q('Rolling coefficient', '', 0, 0.2, 'Rolling resistance per weight.', [0.007, 0.012], PRACTICE),
  'vehicle.driveEfficiency': q('Drive efficiency', '', 0, 1, 'Wheel power per pack power while driving.', [0.8, 0.95], PRACTICE, 'above'),
  'vehicle.regenEfficiency': q('Regeneration efficiency', '', 0, 1, 'Pack power per wheel power while slowing.', [0.6, 0.9], PRACTICE),
  'vehicle.hotelW': q('Vehicle at rest', 'W', 0, 50000, 'Electronics, always on.', [200, 600], PRACTICE),
  'vehicle.cabinWPerAmbient.tempC[]': q('Ambient', '°C', -60, 70, 'Ambient of this row.', [-20, 40], PRACTICE),
  'vehicle.cabinWPerAmbient.watts[]': q('Cabin', 'W', 0, 50000, 'Cabin heating or cooling at that ambient.', [0, 5000], PRACTICE),
  'vehicle.cabinAtStops': q('Cabin while stopped', '', 0, 1, 'Share of the cabin power that goes on while stopped.', [0, 1], PRACTICE),
  'trip.ambientC': q('Ambient', '°C', -60, 70, 'Air over the trip, where a leg has none of its own.', [-20, 40], PRACTICE),
  'trip.startSoc': q('Start soc', '', 0, 1, 'State of charge at departure.', [0.8, 1], PRACTICE),
  'trip.startTempC': q('Start temperature', '°C', -40, 80, 'All cells and the coolant at departure.', [-10, 40], PRACTICE),
  'trip.reserveSoc': q('Reserve', '', 0, 1, 'Least state of charge wanted on arrival.', [0.05, 0.15], PRACTICE),
  'trip.legs[].km': q('Distance', 'km', 0, 5000, 'Length of the leg.', [10, 400], PRACTICE, 'above'),
  'trip.legs[].kmPerH': q('Speed', 'km/h', 0, 400, 'Constant speed over the leg.', [80, 130], PRACTICE, 'above'),
  'trip.legs[].climbM': q('Climb', 'm', -10000, 10000, 'Height gained from start to end of the leg.', [-500, 500], PRACTICE),
  'trip.legs[].windKmPerH': q('Head wind', 'km/h', -200, 200, 'Positive against the car.', [-20, 20], PRACTICE),
  'trip.legs[].ambientC': q('Ambient', '°C', -60, 70, 'Air over this leg.', [-20, 40], PRACTICE),
  'trip.stopOverheadMin': q('Stop overhead', 'min', 0, 1000, 'Minutes at rest before each session: leaving the road, plugging in, paying.', [3, 10], PRACTICE),
  'trip.precondition.targetC': q('Precondition to', '°C', -20, 60, 'Mean surface temperature aimed for at plug-in.', [20, 40], PRACTICE),
  'trip.precondition.leadMin': q('Precondition for', 'min', 0, 300, 'Minutes before plug-in.', [10, 45], PRACTICE),
} as const satisfies Record<string, Quantity>;

export type QuantityPath = keyof typeof quantities;

function q(
  label: string,
  unit: string,
  min: number,
  max: number,
  what: string,
  usual: readonly [number, number],
  source: string,
  rule?: 'above' | 'integer',
): Quantity {
  return { label, unit, min, max, what, usual, source, ...(rule ? { [rule]: true } : {}) };
}
