import { useState } from 'react';
import { useStudyDesk } from '../hooks/study-desk-context.ts';
import { useLibraryTaking } from '../hooks/use-library-taking.ts';
import { usePartOrigin, type PartOrigin as Origin } from '../hooks/use-part-origin.ts';
import { useDesk } from '../hooks/use-desk.ts';
import { partWords, type DeskPart } from '../model/library-parts.ts';
import { LibraryPicker } from './library-picker.tsx';
import { SavePartDialog } from './save-part-dialog.tsx';

type Props = { part: DeskPart };

/** Where a section came from, and what the library offers in its place. */
export function OriginOfPart({ part }: Props) {
  const { mayEdit } = useStudyDesk();
  const origin = usePartOrigin(part);
  const isThere = useDesk(({ sheet }) => sheet.draft.study[part] !== undefined);
  if (!isThere) return mayEdit ? <OriginActions part={part} origin={null} isThere={false} /> : null;
  return (
    <div className="origin">
      <p>{origin ? originWords(origin) : 'Not from the library'}</p>
      {mayEdit && origin?.offered && <NewerRevision part={part} origin={origin} offered={origin.offered} />}
      {mayEdit && <OriginActions part={part} origin={origin} isThere />}
    </div>
  );
}

function originWords({ name, reference, isChanged, isArchived }: Origin): string {
  const words = [
    `${name}, revision ${reference.revision}`,
    isChanged && 'changed here',
    isArchived && 'in the archive',
  ];
  return words.filter(Boolean).join(', ');
}

type NewerProps = Props & { origin: Origin; offered: number };

/** Offered until it is taken, or looked at and left. */
function NewerRevision({ part, origin, offered }: NewerProps) {
  const { takeRevision, keep } = useLibraryTaking(part);
  const { name, reference } = origin;
  return (
    <p className="newer">
      {`Revision ${offered} exists: `}
      <button
        type="button"
        className="lnk"
        aria-label={`Take revision ${offered} of ${name}`}
        onClick={() => void takeRevision(reference.itemId, offered)}
      >
        take it
      </button>
      <button
        type="button"
        className="lnk"
        aria-label={`Keep revision ${reference.revision} of ${name}`}
        onClick={() => keep(name, offered)}
      >
        keep {reference.revision}
      </button>
    </p>
  );
}

type ActionsProps = Props & { origin: Origin | null; isThere: boolean };

function OriginActions({ part, origin, isThere }: ActionsProps) {
  const { mayEditLibrary } = useStudyDesk();
  const [open, setOpen] = useState<'picker' | 'save' | null>(null);
  const onOpenChange = (isOpen: boolean) => !isOpen && setOpen(null);
  const maySave = mayEditLibrary && isThere && (origin === null || origin.isChanged);
  return (
    <p className="origin-actions">
      <button
        type="button"
        className="lnk"
        aria-label={`From the library: ${partWords[part]}`}
        onClick={() => setOpen('picker')}
      >
        From the library
      </button>
      {maySave && (
        <button
          type="button"
          className="lnk"
          aria-label={`Save to the library: ${partWords[part]}`}
          onClick={() => setOpen('save')}
        >
          Save to the library
        </button>
      )}
      {open === 'picker' && <LibraryPicker part={part} onOpenChange={onOpenChange} />}
      {open === 'save' && <SavePartDialog part={part} origin={origin} onOpenChange={onOpenChange} />}
    </p>
  );
}
