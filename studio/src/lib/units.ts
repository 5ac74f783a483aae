import { storedValue, useStoredValue } from './stored-value.ts';

export type TemperatureUnit = '°C' | '°F';
export type DistanceUnit = 'km' | 'mi';
export type UnitSystem = { temperature: TemperatureUnit; distance: DistanceUnit };

/** International mile, exact (1959 agreement). */
const KM_PER_MILE = 1.609344;

const isUnitSystem = (value: unknown): value is UnitSystem => {
  const units = value as UnitSystem | null;
  return ['°C', '°F'].includes(units?.temperature ?? '') && ['km', 'mi'].includes(units?.distance ?? '');
};

const stored = storedValue<UnitSystem>('voltiplano.units', { temperature: '°C', distance: 'km' }, isUnitSystem);

export function setUnits(change: Partial<UnitSystem>): void {
  stored.set({ ...stored.get(), ...change });
}

/** Converts between what the engine speaks (°C, km) and what a person reads. */
export type Units = {
  system: UnitSystem;
  temperatureUnit: TemperatureUnit;
  distanceUnit: DistanceUnit;
  /** °C to the unit shown. */
  temperature: (celsius: number) => number;
  /** The unit shown to °C. */
  toCelsius: (shown: number) => number;
  /** A difference of temperatures [K] in degrees shown. */
  temperatureDifference: (kelvin: number) => number;
  /** km to the unit shown. */
  distance: (km: number) => number;
  /** The unit shown to km. */
  toKm: (shown: number) => number;
};

export function unitsOf(system: UnitSystem): Units {
  const fahrenheit = system.temperature === '°F';
  const miles = system.distance === 'mi';
  return {
    system,
    temperatureUnit: system.temperature,
    distanceUnit: system.distance,
    temperature: (celsius) => (fahrenheit ? celsius * 1.8 + 32 : celsius),
    toCelsius: (shown) => (fahrenheit ? (shown - 32) / 1.8 : shown),
    temperatureDifference: (kelvin) => (fahrenheit ? kelvin * 1.8 : kelvin),
    distance: (km) => (miles ? km / KM_PER_MILE : km),
    toKm: (shown) => (miles ? shown * KM_PER_MILE : shown),
  };
}

const known = new Map<string, Units>();

/** The units chosen in this browser; the same object until the choice changes. */
export function useUnits(): Units {
  const system = useStoredValue(stored);
  const key = `${system.temperature} ${system.distance}`;
  const units = known.get(key) ?? unitsOf(system);
  known.set(key, units);
  return units;
}
