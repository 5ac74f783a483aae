import type { SessionStudyInput, TripStudyInput } from '@voltiplano/engine';
import type { LibraryItem, LibraryKind } from '../../../../../server/src/contract/library.ts';
import { examples } from '../../../lib/examples.ts';

type Body = LibraryItem['body'];

/** What a new part begins from: a part of the demo world, to be changed by whoever adds it. */
export async function startingPart(kind: LibraryKind): Promise<Body> {
  if (kind === 'vehicle') return (await trip()).vehicle;
  if (kind === 'route') return routeOf(await trip(), await session());
  const study = await session();
  return study[kind] as Body;
}

const session = () => examples[0]!.load();

// A study file is typed by its check, not by its text.
const trip = async () =>
  (await import('../../../../../examples/vicuna-one-leg.json')).default as unknown as TripStudyInput;

/** Two legs with a stop between them. */
function routeOf({ trip: { legs } }: TripStudyInput, { station }: SessionStudyInput): Body {
  const [leg] = legs as [TripStudyInput['trip']['legs'][number]];
  return {
    legs: [
      { ...leg, station, depart: { rule: 'target', soc: 0.8 } },
      { km: 120, kmPerH: 100 },
    ],
  };
}
