import { describe, expect, it } from 'vitest';
import { limitSpans } from './limit-spans.ts';

const at = (min: number, event: string) => ({ tS: min * 60, event });

describe('limitSpans', () => {
  it('reads from the events which limit held when; other events are none', () => {
    const events = [at(0, 'boost'), at(0, 'limit:taper'), at(2, 'ledge:2'), at(4, 'limit:hot'), at(9, 'end:target')];
    expect(limitSpans(events, 9, 0.05)).toEqual([
      { limit: 'taper', fromMin: 0, toMin: 4 },
      { limit: 'hot', fromMin: 4, toMin: 9 },
    ]);
  });

  it('lets splinters pass into the span before them, which may join what comes behind', () => {
    const events = [at(0, 'limit:taper'), at(4, 'limit:hot'), at(4.04, 'limit:taper'), at(6, 'limit:cold')];
    expect(limitSpans(events, 8, 0.05)).toEqual([
      { limit: 'taper', fromMin: 0, toMin: 6 },
      { limit: 'cold', fromMin: 6, toMin: 8 },
    ]);
  });

  it('lets a first splinter pass into the span behind it', () => {
    const events = [at(0, 'limit:station-ramp'), at(0.04, 'limit:taper')];
    expect(limitSpans(events, 8, 0.05)).toEqual([{ limit: 'taper', fromMin: 0, toMin: 8 }]);
  });

  it('keeps the only span of a session that ends as it begins', () => {
    expect(limitSpans([at(0, 'limit:taper'), at(0, 'end:target')], 0, 0.05)).toEqual([
      { limit: 'taper', fromMin: 0, toMin: 0 },
    ]);
  });
});
