/// <reference lib="webworker" />
import { parseSessionStudy } from '../src/index.ts';
import { median, timeRuns, warmUp } from './measure-session.ts';

// A browser's clock is coarse, so it times batches rather than runs.
const BATCHES = 25;
const BATCH = 8;

self.onmessage = ({ data }: MessageEvent<unknown>) => {
  const study = parseSessionStudy(data);
  warmUp(study);
  const batches = Array.from({ length: BATCHES }, () => {
    const began = performance.now();
    timeRuns(study, BATCH);
    return (performance.now() - began) / BATCH;
  });
  self.postMessage(median(batches));
};
