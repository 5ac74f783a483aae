import { useQueryClient } from '@tanstack/react-query';
import { toast } from '../../../components/toasts.tsx';
import { problemSentence } from '../../../lib/api/api-problem.ts';
import { libraryRevisionQuery } from '../api/library-queries.ts';
import { whyNotTaken, withReference, type DeskPart } from '../model/library-parts.ts';
import { useStudyDesk } from './study-desk-context.ts';
import { useDeskStore } from './use-desk.ts';

/** A revision of a part of the library, as it can be put on the desk. */
export type Taking = { itemId: string; name: string; revision: number; body: object };

/** Puts parts of the library on the desk, or leaves them; each is one step of undo, references included. */
export function useLibraryTaking(part: DeskPart) {
  const { place } = useStudyDesk();
  const store = useDeskStore();
  const client = useQueryClient();
  /** Gives why not, in words; null where it was done. */
  const take = ({ itemId, name, revision, body }: Taking): string | null => {
    const { draft, references } = store.get().sheet;
    const why = whyNotTaken(draft.study, part, body);
    if (why !== null) return `The study could not be run with it: ${why}.`;
    const next = withReference(references, { part, itemId, revision, keptAgainst: null });
    const label = `take ${name}, revision ${revision}`;
    store.dispatch({ type: 'refer', references: next, parts: [{ path: part, value: body }], label });
    return null;
  };
  const takeRevision = async (itemId: string, revision: number): Promise<void> => {
    try {
      const { name, body } = await client.fetchQuery(libraryRevisionQuery(place.workspaceId, itemId, revision));
      const why = take({ itemId, name, revision, body });
      if (why !== null) toast(`Not taken. ${why}`, { kind: 'stop' });
    } catch (error) {
      toast(`Not taken. ${problemSentence(error)}`, { kind: 'stop' });
    }
  };
  const keep = (name: string, against: number): void => {
    const { references } = store.get().sheet;
    const reference = references.find((one) => one.part === part);
    if (!reference) return;
    const next = withReference(references, { ...reference, keptAgainst: against });
    store.dispatch({
      type: 'refer',
      references: next,
      parts: [],
      label: `keep ${name}, revision ${reference.revision}`,
    });
  };
  return { take, takeRevision, keep };
}
