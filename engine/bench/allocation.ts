import { Session } from 'node:inspector/promises';
import type { SessionStudy } from '../src/index.ts';
import { SessionSystem } from '../src/session/session-system.ts';

const CALLS = 300_000;
const ROUNDS = 4;

type Node = { selfSize: number; children: Node[] };

/**
 * Bytes that one evaluation of the derivative leaves on the heap, the least of a few rounds of compiled code. A number that
 * passes a call the compiler did not inline takes 16 bytes; an object, array or closure takes more, and once a segment much more.
 */
export async function bytesPerEvaluation(study: SessionStudy): Promise<number> {
  const system = new SessionSystem(study);
  const y = system.start.slice();
  const dy = y.map(() => 0);
  const { zLow, zSpan } = system.pack;
  const evaluate = () => {
    for (let i = 0; i < CALLS; i++) {
      y[0] = zLow + (zSpan * (i % 1000)) / 1000;
      system.derivative(100 + (i % 1000), y, dy);
    }
  };
  evaluate();
  const session = new Session();
  session.connect();
  const rounds: number[] = [];
  for (let round = 0; round < ROUNDS; round++) {
    await session.post('HeapProfiler.startSampling', {
      samplingInterval: 4096,
      includeObjectsCollectedByMajorGC: true,
      includeObjectsCollectedByMinorGC: true,
    });
    evaluate();
    const { profile } = await session.post('HeapProfiler.stopSampling');
    rounds.push(total(profile.head) / CALLS);
  }
  session.disconnect();
  return Math.min(...rounds);
}

function total(node: Node): number {
  return node.children.reduce((sum, child) => sum + total(child), node.selfSize);
}
