import type { SessionStudyInput } from '@voltiplano/engine';

export type Example = { title: string; shows: string; load: () => Promise<SessionStudyInput> };

// A study file is typed by its check, not by its text.
const study = async (file: Promise<{ default: unknown }>) => (await file).default as SessionStudyInput;

/** Ready-made sessions of the demo world, each with what it shows; the first is on the desk of a new person. */
export const examples: Example[] = [
  {
    title: 'Vicuña, warm arrival',
    shows: 'Six ledges on a 500 A station, the van’s pack already warm.',
    load: () => study(import('../../../examples/vicuna-warm-arrival.json')),
  },
  {
    title: 'Vicuña, cold morning',
    shows: 'The cold limit holds until the heater has done its work.',
    load: () => study(import('../../../examples/vicuna-cold-morning.json')),
  },
  {
    title: 'Vicuña, shared station',
    shows: 'Power is shared for nine minutes and given back.',
    load: () => study(import('../../../examples/vicuna-shared-station.json')),
  },
  {
    title: 'Vicuña, third stop of a hot day',
    shows: 'Chiller at its most, the hot limit takes over from the ledges.',
    load: () => study(import('../../../examples/vicuna-third-stop.json')),
  },
  {
    title: 'Vicuña town, LFP',
    shows: 'A flat rest voltage and ledges that move on at cell voltages.',
    load: () => study(import('../../../examples/vicuna-town-lfp.json')),
  },
  {
    title: 'Suri, full power',
    shows: 'An 800-V-class pack, preconditioned, tapered along a slope.',
    load: () => study(import('../../../examples/suri-full-power.json')),
  },
  {
    title: 'Suri on a 500 V station',
    shows: 'The same pack through its boost converter.',
    load: () => study(import('../../../examples/suri-boost-at-500-v.json')),
  },
  {
    title: 'Suri, cool evening',
    shows: 'A taper map over soc and temperature.',
    load: () => study(import('../../../examples/suri-map-cool-evening.json')),
  },
];
