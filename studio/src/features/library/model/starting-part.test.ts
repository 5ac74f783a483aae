import { partIssues } from '@voltiplano/engine';
import { expect, test } from 'vitest';
import { libraryKinds } from '../../../../../server/src/contract/library.ts';
import { startingPart } from './starting-part.ts';

test.each(libraryKinds)('a new %s begins from a part that the engine takes', async (kind) => {
  expect(partIssues(kind, await startingPart(kind))).toEqual([]);
});
