import { useQuery } from '@tanstack/react-query';
import type { LibraryRevision } from '../../../../../server/src/contract/library.ts';
import type { PartReference } from '../../../../../server/src/contract/study.ts';
import { libraryRevisionQuery } from '../api/library-queries.ts';
import { referenceTo, saysOtherwise, type DeskPart } from '../model/library-parts.ts';
import { useStudyDesk } from './study-desk-context.ts';
import { useStudy } from './use-study.ts';
import { useDesk } from './use-desk.ts';

/** Where a part of the desk came from, and how the library stands to it. */
export type PartOrigin = {
  reference: PartReference;
  name: string;
  /** The revision that the part was taken from; undefined until it is read. */
  taken: LibraryRevision | undefined;
  isChanged: boolean;
  isArchived: boolean;
  newest: number;
  /** A newer revision that nobody has looked at and left. */
  offered: number | null;
};

/** The origin of a part; null where it was not taken from the library, or where what was taken is no longer there. */
export function usePartOrigin(part: DeskPart): PartOrigin | null {
  const { place } = useStudyDesk();
  const { working } = useStudy();
  const reference = useDesk(({ sheet }) => referenceTo(sheet.references, part));
  const own = useDesk(({ sheet }) => sheet.draft.study[part]);
  const { itemId = '', revision = 1, keptAgainst = null } = reference ?? {};
  const { data: taken } = useQuery({
    ...libraryRevisionQuery(place.workspaceId, itemId, revision),
    enabled: reference !== undefined,
  });
  if (!reference || own === undefined) return null;
  const standing = working.parts.find((one) => one.itemId === itemId);
  const newest = Math.max(standing?.newestRevision ?? 1, revision);
  const isKnown = standing?.revision === revision;
  return {
    reference,
    name: taken?.name ?? standing?.itemName ?? '',
    taken,
    isChanged: taken ? saysOtherwise(part, own, taken.body) : isKnown && standing.isChanged,
    isArchived: standing?.isArchived ?? false,
    newest,
    offered: newest > Math.max(revision, keptAgainst ?? 0) ? newest : null,
  };
}
