import { readFileSync } from 'node:fs';
import { parseStudyText, type SessionStudyInput, type TripStudyInput } from '@voltiplano/engine';

/** A study of `examples/`, as it stands there. @throws {StudyError} if it is none that the engine takes */
function readExample(name: string): unknown {
  const text = readFileSync(new URL(`../../../examples/${name}.json`, import.meta.url), 'utf8');
  parseStudyText(text);
  return JSON.parse(text);
}

const sessionOf = (name: string) => readExample(name) as SessionStudyInput;

/** Where the demo's numbers come from, so that nothing is said twice. */
export const vicuna = sessionOf('vicuna-warm-arrival');
export const vicunaShared = sessionOf('vicuna-shared-station');
export const vicunaColdMorning = sessionOf('vicuna-cold-morning');
export const vicunaThirdStop = sessionOf('vicuna-third-stop');
export const town = sessionOf('vicuna-town-lfp');
export const suri = sessionOf('suri-full-power');
export const suriBoosted = sessionOf('suri-boost-at-500-v');
export const suriMap = sessionOf('suri-map-cool-evening');
export const vicunaLeg = readExample('vicuna-one-leg') as TripStudyInput;
