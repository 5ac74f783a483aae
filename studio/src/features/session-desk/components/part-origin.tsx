import { lazy, Suspense } from 'react';
import { useStudyDeskIfAny } from '../hooks/study-desk-context.ts';
import type { DeskPart } from '../model/library-parts.ts';

// A guest's desk never waits for what only a library needs.
const OriginOfPart = lazy(async () => ({ default: (await import('./origin-of-part.tsx')).OriginOfPart }));

/** Where a section came from, on the desk of a study of a workspace; a guest's has no library. */
export function PartOrigin({ part }: { part: DeskPart }) {
  if (!useStudyDeskIfAny()) return null;
  return (
    <Suspense fallback={<p className="origin">&nbsp;</p>}>
      <OriginOfPart part={part} />
    </Suspense>
  );
}
