import type { Vehicle } from '../study/schema.ts';

const GRAVITY = 9.80665;
/** ISA at sea level: 1.225 kg/m³ at 288.15 K (ISO 2533). */
const airDensity = (ambientC: number) => (1.225 * 288.15) / (ambientC + 273.15);

export type Road = { speedMps: number; windMps: number; sinSlope: number; ambientC: number };

/**
 * Power at the wheels at constant speed [W]: air, rolling and slope.
 *
 * @param road  speed and head wind [m/s], climb per distance, ambient [°C]
 * @see engine/MODEL.md, section 7
 */
export function wheelPower(vehicle: Vehicle, { speedMps, windMps, sinSlope, ambientC }: Road): number {
  const air = speedMps + windMps;
  const cosSlope = Math.sqrt(1 - sinSlope * sinSlope);
  const weight = vehicle.massKg * GRAVITY;
  const drag = 0.5 * airDensity(ambientC) * vehicle.dragAreaM2 * air * Math.abs(air);
  return speedMps * (drag + vehicle.rollingCoefficient * weight * cosSlope + weight * sinSlope);
}

/** Power between pack and wheels as the pack sees it [W]: positive while it drives, negative while it is fed. */
export function tractionPower(vehicle: Vehicle, road: Road): number {
  const wheels = wheelPower(vehicle, road);
  return wheels >= 0 ? wheels / vehicle.driveEfficiency : wheels * vehicle.regenEfficiency;
}

/** Cabin heating or cooling at an ambient [W]. */
export function cabinPower(vehicle: Vehicle, ambientC: number): number {
  const table = vehicle.cabinWPerAmbient;
  if (table === undefined) return 0;
  const { tempC, watts } = table;
  const last = tempC.length - 1;
  if (ambientC <= tempC[0]) return watts[0];
  if (ambientC >= tempC[last]) return watts[last];
  const i = tempC.findIndex((temp) => temp > ambientC) - 1;
  const u = (ambientC - tempC[i]) / (tempC[i + 1] - tempC[i]);
  return watts[i] + u * (watts[i + 1] - watts[i]);
}
