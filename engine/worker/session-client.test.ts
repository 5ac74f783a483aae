import { afterEach, beforeAll, expect, test, vi } from 'vitest';
import { parseSessionStudy, simulateSession, StudyError, type SessionStudyInput } from '../src/index.ts';
import { timedStudy } from '../bench/studies.ts';
import { Cancelled, createSessionClient, WorkerCrashed, type SessionClient } from './index.ts';
import { bundleSessionWorker, startNodeWorker } from './node-worker.ts';

const study: SessionStudyInput = timedStudy('b1');
/** Takes long enough to be interrupted. */
const long = { everyS: 0.01, rtol: 1e-11 };
const startingAt = (startSoc: number): SessionStudyInput => ({ ...study, session: { ...study.session, startSoc } });

let sessionWorker: string;
let client: SessionClient | undefined;

beforeAll(async () => {
  sessionWorker = await bundleSessionWorker();
});

afterEach(() => client?.close());

/** A client on real threads of Node; `made` counts them. `first` replaces the program of the first. */
function open(size = 1, first = sessionWorker) {
  const made = vi.fn((): Worker => startNodeWorker(made.mock.calls.length === 1 ? first : sessionWorker));
  client = createSessionClient(made, size);
  return { client, made };
}

test('run answers what the engine answers, with the thermal network beside it', async () => {
  const { client } = open();
  const answer = await client.run(study, { everyS: 30 }).result;
  expect(answer.result).toStrictEqual(simulateSession(parseSessionStudy(study), { everyS: 30 }).result);
  expect(answer.thermal.timeConstantsS).toHaveLength(2);
  expect(answer.thermal.steady!.heatW).toBeGreaterThan(500);
  expect(answer.ms).toBeGreaterThan(0);
});

test('run tells progress: rising shares, at most one a twentieth', async () => {
  const { client } = open();
  const shares: number[] = [];
  await client.run(study, { rtol: 1e-9, onProgress: (share) => shares.push(share) }).result;
  await vi.waitFor(() => expect(shares.at(-1)).toBeGreaterThan(0.9));
  expect(shares.length).toBeGreaterThan(5);
  expect(shares.length).toBeLessThanOrEqual(20);
  expect(shares).toEqual([...shares].sort((a, b) => a - b));
  expect(shares.at(-1)).toBeLessThanOrEqual(1);
});

test('run rejects with the study error as it was thrown: code, issues, message', async () => {
  const { client, made } = open();
  const bad = { ...study, pack: { ...study.pack, series: -1 } };
  const error = await client.run(bad).result.catch((reason: unknown) => reason);
  expect(error).toBeInstanceOf(StudyError);
  expect(error).toMatchObject({ code: 'INVALID_STUDY', issues: [{ path: 'pack.series', rule: 'range' }] });
  expect((error as StudyError).message).toContain('pack.series');
  await client.run(study).result;
  expect(made).toHaveBeenCalledTimes(1);
});

test('cancel ends a run under way with Cancelled, replaces its worker, and the next run works', async () => {
  const { client, made } = open();
  let begun = () => {};
  const underWay = new Promise<void>((resolve) => (begun = resolve));
  const ticket = client.run(study, { ...long, onProgress: () => begun() });
  const next = client.run(study);
  const rejected = expect(ticket.result).rejects.toBeInstanceOf(Cancelled);
  await underWay;
  ticket.cancel();
  await rejected;
  await expect(next.result).resolves.toHaveProperty('result.kind', 'session');
  expect(made).toHaveBeenCalledTimes(2);
});

test('cancel takes a run that has not begun out of the line and leaves the one under way alone', async () => {
  const { client, made } = open();
  const first = client.run(study);
  const second = client.run(study);
  const rejected = expect(second.result).rejects.toBeInstanceOf(Cancelled);
  second.cancel();
  await rejected;
  await expect(first.result).resolves.toHaveProperty('result.kind', 'session');
  expect(made).toHaveBeenCalledTimes(1);
  // Once a run is over there is nothing to call off.
  first.cancel();
  await expect(client.run(study).result).resolves.toHaveProperty('result.kind', 'session');
  expect(made).toHaveBeenCalledTimes(1);
});

test('a worker that breaks down rejects its run with WorkerCrashed and the reason, and is replaced', async () => {
  const breaking = `require('node:worker_threads').parentPort.once('message', () => { throw new Error('out of ideas'); })`;
  const { client, made } = open(1, breaking);
  const first = client.run(study);
  const next = client.run(study);
  const error = await first.result.catch((reason: unknown) => reason);
  expect(error).toBeInstanceOf(WorkerCrashed);
  expect((error as Error).message).toBe('The worker broke down (out of ideas). It has been replaced; try again.');
  await expect(next.result).resolves.toHaveProperty('result.kind', 'session');
  expect(made).toHaveBeenCalledTimes(2);
});

test('a message that cannot cross the border rejects its run with WorkerCrashed, and the next run works', async () => {
  const { client } = open();
  const uncloneable = { ...study, title: (() => '') as unknown as string };
  await expect(client.run(uncloneable).result).rejects.toBeInstanceOf(WorkerCrashed);
  await expect(client.run(study).result).resolves.toHaveProperty('result.kind', 'session');
});

test('latest makes the first and the newest of what was asked meanwhile; the others are rejected with Cancelled', async () => {
  const { client, made } = open();
  const asked = [0.1, 0.2, 0.3, 0.4].map((soc) => client.latest(startingAt(soc), { everyS: 600 }));
  const settled = await Promise.allSettled(asked);
  expect(settled.map(({ status }) => status)).toEqual(['fulfilled', 'rejected', 'rejected', 'fulfilled']);
  const start = (i: number) => {
    const outcome = settled[i];
    return outcome.status === 'fulfilled' ? outcome.value.result.series.soc[0] : (outcome.reason as Error);
  };
  expect(start(0)).toBeCloseTo(0.1, 12);
  expect(start(1)).toBeInstanceOf(Cancelled);
  expect(start(2)).toBeInstanceOf(Cancelled);
  expect(start(3)).toBeCloseTo(0.4, 12);
  expect(made).toHaveBeenCalledTimes(1);
});

test('latest goes on after a run that failed', async () => {
  const { client } = open();
  const failing = client.latest({ ...study, session: { ...study.session, startSoc: 2 } });
  const after = client.latest(startingAt(0.5));
  await expect(failing).rejects.toBeInstanceOf(StudyError);
  await expect(after).resolves.toHaveProperty('result.kind', 'session');
});

test('summarise answers in the order asked, from all workers, with an error where one study fails', async () => {
  const { client, made } = open(2);
  const socs = Array.from({ length: 19 }, (_, i) => 0.05 * (i + 1));
  const studies = socs.map(startingAt);
  studies[10] = { ...study, station: { ...study.station, voltageMaxV: 200 } };
  const counts: number[] = [];
  const summaries = await client.summarise(studies, (done) => counts.push(done)).result;
  expect(made).toHaveBeenCalledTimes(2);
  expect(counts.at(-1)).toBe(19);
  expect(counts).toHaveLength(3);
  expect(summaries[10]).toBeInstanceOf(StudyError);
  expect(summaries[10]).toMatchObject({ code: 'REFUSED' });
  for (const i of [0, 7, 8, 18]) {
    const { metrics, energyLedger } = simulateSession(parseSessionStudy(studies[i]), { everyS: 600 }).result;
    expect(summaries[i]).toStrictEqual({ metrics, energyLedger });
  }
});

test('summarise can be called off as a whole', async () => {
  const { client } = open();
  const ticket = client.summarise(Array.from({ length: 40 }, () => study));
  const rejected = expect(ticket.result).rejects.toBeInstanceOf(Cancelled);
  ticket.cancel();
  await rejected;
  await expect(client.run(study).result).resolves.toHaveProperty('result.kind', 'session');
});

test('close rejects what is not done with Cancelled, and what is asked after it', async () => {
  const { client } = open();
  const underWay = client.run(study, long);
  const waiting = client.run(study);
  const rejected = Promise.all([underWay, waiting].map((one) => expect(one.result).rejects.toBeInstanceOf(Cancelled)));
  client.close();
  await rejected;
  await expect(client.run(study).result).rejects.toBeInstanceOf(Cancelled);
});
