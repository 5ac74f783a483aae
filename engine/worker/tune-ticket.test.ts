import { afterEach, beforeAll, expect, test, vi } from 'vitest';
import { parseTuneRequest, StudyError, tuneTaper, type TuneProgress, type TuneRequestInput } from '../src/index.ts';
import { plainVicuna } from '../validation/tune-cases.ts';
import { Cancelled, createSessionClient, type SessionClient } from './index.ts';
import { bundleSessionWorker, startNodeWorker } from './node-worker.ts';

const request = (count: number): TuneRequestInput => ({
  format: 'voltiplano/tune',
  version: 1,
  study: plainVicuna(),
  shape: { kind: 'ledges', count },
  unit: 'A',
  bounds: { lowestAnodeMinMv: 40 },
  goal: { kind: 'least-minutes', fromSoc: 0.1, toSoc: 0.8 },
  tradeOff: false,
});

let program: string;
let client: SessionClient | undefined;

beforeAll(async () => {
  program = await bundleSessionWorker();
});
afterEach(() => client?.close());

function open() {
  const made = vi.fn((): Worker => startNodeWorker(program));
  client = createSessionClient(made, 1);
  return { client, made };
}

test('tune answers what the engine answers, and tells progress that never falls', async () => {
  const { client } = open();
  const told: TuneProgress[] = [];
  const result = await client.tune(request(2), (progress) => told.push(progress)).result;
  expect(result).toStrictEqual(tuneTaper(parseTuneRequest(request(2))));
  expect(told.length).toBeGreaterThan(2);
  const shares = told.map(({ share }) => share);
  expect(shares).toEqual([...shares].sort((a, b) => a - b));
});

test('cancel ends a tuning between runs and keeps its worker, which goes on to the next job', async () => {
  const { client, made } = open();
  let begun = () => {};
  const underWay = new Promise<void>((resolve) => (begun = resolve));
  const ticket = client.tune(request(12), () => begun());
  const rejected = expect(ticket.result).rejects.toBeInstanceOf(Cancelled);
  await underWay;
  ticket.cancel();
  await rejected;
  await expect(client.tune(request(1)).result).resolves.toHaveProperty('format', 'voltiplano/tune-result');
  expect(made).toHaveBeenCalledTimes(1);
});

test('cancel takes a tuning that has not begun out of the line', async () => {
  const { client } = open();
  const first = client.tune(request(1));
  const second = client.tune(request(1));
  const rejected = expect(second.result).rejects.toBeInstanceOf(Cancelled);
  second.cancel();
  await rejected;
  await expect(first.result).resolves.toHaveProperty('format', 'voltiplano/tune-result');
});

test('a request at fault rejects with the study error: code, path, message', async () => {
  const { client } = open();
  const error = await client.tune({ ...request(1), bounds: {} }).result.catch((reason: unknown) => reason);
  expect(error).toBeInstanceOf(StudyError);
  expect(error).toMatchObject({ code: 'INVALID_STUDY', issues: [{ path: 'tune.bounds', rule: 'no-bound' }] });
});
