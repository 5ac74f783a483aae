import {
  parseSessionStudy,
  parseTuneRequest,
  type SessionStudy,
  type SessionStudyInput,
  type TuneRequest,
  type TuneRequestInput,
} from '../src/index.ts';
import { readJson } from './studies.ts';

export type Asked = Omit<TuneRequestInput, 'format' | 'version' | 'study' | 'tradeOff'> &
  Partial<Pick<TuneRequestInput, 'tradeOff'>>;

/** A request around a checked study; the trade-off curve is left out unless asked for. */
export function tuning(study: SessionStudy, asked: Asked): TuneRequest {
  return parseTuneRequest({ format: 'voltiplano/tune', version: 1, study, tradeOff: false, ...asked });
}

/** The warm Vicuña as one segment with one RC pair, its own anode guard off and its hot guard out of the way, to 80 %. */
export function plainVicuna(change: (study: SessionStudyInput) => void = () => {}): SessionStudy {
  const study = readJson('../../examples/vicuna-warm-arrival.json') as SessionStudyInput;
  study.pack.segments = 1;
  study.cell.rcPairs = [{ rMilliohm: 0.8, tauS: 60 }];
  delete study.strategy.anodeMarginMv;
  study.strategy.hotDerate = { fromC: 55, toC: 65 };
  study.session.startSoc = 0.1;
  study.session.targetSoc = 0.8;
  change(study);
  return parseSessionStudy(study);
}

/** Numbers from 0 to 1 that follow from a seed alone (mulberry32). */
export function seeded(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = state;
    t = Math.imul(t ^ (t >>> 15), t | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
}
