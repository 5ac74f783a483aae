export const CAUTION =
  'A simulation is not a test. Lithium-ion cells can vent, burn or explode when charged too fast, too cold, too hot or past their voltage window. Results are estimates for engineering study: they do not replace the cell maker’s limits, abuse testing, functional-safety work or the judgement of qualified engineers. Vehicle, charger and installation work follows the local codes and standards in force (among them UN R100, ISO 6469-1, IEC 61851-23, IEC 62660, UN 38.3, the local electrical code) and licensed practice.';

/** Printed on every exported drawing. */
export const CAUTION_SHORT =
  'A simulation is not a test. Results are estimates for engineering study; they do not replace the cell maker’s limits, abuse testing or the judgement of qualified engineers.';
