import './jitless.ts';
import * as Comlink from 'comlink';
import {
  parseSessionStudy,
  simulateSession,
  StudyError,
  thermalAnalysis,
  type SessionStudyInput,
} from '../src/index.ts';
import { packAnswer } from './pack-series.ts';
import { sweepCells } from './sweep-cells.ts';
import { cancelTune, tuneJob } from './tune-job.ts';
import type { Outcome, PackedAnswer, RunOptions, RunSummary, SessionAnswer, SessionWorker } from './protocol.ts';

const worker: SessionWorker = {
  run(study, options, onProgress) {
    const outcome = attempt(() => answer(study, options, onProgress));
    if (!outcome.ok) return outcome;
    const packed: PackedAnswer = packAnswer(outcome.value);
    return Comlink.transfer({ ok: true as const, value: packed }, [packed.block]);
  },
  summarise(studies, onProgress) {
    const summaries = studies.map((study, i) => {
      const outcome = attempt(() => summary(study));
      onProgress?.(i + 1);
      return outcome;
    });
    return { ok: true, value: summaries };
  },
  sweepCells,
  tune: tuneJob,
  cancelTune,
};

Comlink.expose(worker);

function answer(
  input: SessionStudyInput,
  options: RunOptions,
  onProgress: ((share: number) => void) | null,
): SessionAnswer {
  const began = performance.now();
  const study = parseSessionStudy(input);
  const { result } = simulateSession(study, onProgress ? { ...options, onProgress: throttle(onProgress) } : options);
  const heatW =
    ((result.thermalLedger.cellsKj + result.thermalLedger.busbarKj) * 1000) / Math.max(1, result.metrics.endMin * 60);
  const thermal = thermalAnalysis(study, heatW);
  return { result, thermal, ms: performance.now() - began };
}

function summary(input: SessionStudyInput): RunSummary {
  const { metrics, energyLedger } = simulateSession(parseSessionStudy(input), { everyS: 600 }).result;
  return { metrics, energyLedger };
}

/** Passes progress on when it has grown by a twentieth, so that messages do not outweigh the run. */
function throttle(onProgress: (share: number) => void): (share: number) => void {
  let told = 0;
  return (share) => {
    if (share < told + 0.05) return;
    told = share;
    onProgress(share);
  };
}

function attempt<T>(work: () => T): Outcome<T> {
  try {
    return { ok: true, value: work() };
  } catch (error) {
    const { name, message } = error as Error;
    const study = error instanceof StudyError ? { code: error.code, issues: error.issues } : {};
    return { ok: false, failure: { name, message, ...study } };
  }
}
