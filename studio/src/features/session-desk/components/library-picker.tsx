import { useQuery } from '@tanstack/react-query';
import { useDeferredValue, useState } from 'react';
import type { LibraryItem } from '../../../../../server/src/contract/library.ts';
import { AsyncView } from '../../../components/async-view.tsx';
import { Dialog } from '../../../components/dialog.tsx';
import { FormField } from '../../../components/form/form-field.tsx';
import { Notice } from '../../../components/notice.tsx';
import { formatAgo } from '../../../lib/moments.ts';
import { libraryFindQuery } from '../api/library-queries.ts';
import { useStudyDesk } from '../hooks/study-desk-context.ts';
import { useLibraryTaking } from '../hooks/use-library-taking.ts';
import { partWords, type DeskPart } from '../model/library-parts.ts';

type Props = { part: DeskPart; onOpenChange: (open: boolean) => void };

/** Parts of the library of one kind, found by words; the chosen one comes onto the desk. */
export function LibraryPicker({ part, onOpenChange }: Props) {
  const { place } = useStudyDesk();
  const { take } = useLibraryTaking(part);
  const [words, setWords] = useState('');
  const [problem, setProblem] = useState<string | null>(null);
  const query = useQuery(libraryFindQuery(place.workspaceId, part, useDeferredValue(words.trim())));
  const choose = ({ id, name, revision, body }: LibraryItem) => {
    const why = take({ itemId: id, name, revision, body });
    if (why === null) onOpenChange(false);
    else setProblem(`${name} is not taken. ${why}`);
  };
  return (
    <Dialog title={`From the library: ${partWords[part]}`} open onOpenChange={onOpenChange}>
      <div className="flex flex-col gap-[12px]">
        <FormField label="Find">
          <input type="search" autoComplete="off" value={words} onChange={(event) => setWords(event.target.value)} />
        </FormField>
        {problem && <Notice kind="stop">{problem}</Notice>}
        <AsyncView
          query={query}
          loading="Reading the library."
          isEmpty={({ items }) => items.length === 0}
          empty={
            <p className="text-label text-ink2">
              {words
                ? 'Nothing in the library begins so.'
                : 'The library has none yet. Save one from a study, or add it there.'}
            </p>
          }
        >
          {({ items, total }) => (
            <>
              <ul className="picker">
                {items.map((item) => (
                  <li key={item.id}>
                    <button type="button" onClick={() => choose(item)}>
                      <b>{item.name}</b>
                      <small>{`revision ${item.revision}, ${formatAgo(item.changedAt)}${item.notes ? `. ${item.notes}` : ''}`}</small>
                    </button>
                  </li>
                ))}
              </ul>
              {total > items.length && (
                <p className="text-caption text-ink3">{`The first ${items.length} of ${total}. Find the others by a word.`}</p>
              )}
            </>
          )}
        </AsyncView>
      </div>
    </Dialog>
  );
}
