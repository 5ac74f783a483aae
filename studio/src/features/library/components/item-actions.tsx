import type { LibraryItem } from '../../../../../server/src/contract/library.ts';
import { Button } from '../../../components/button.tsx';
import { ConfirmDialog } from '../../../components/confirm.tsx';
import { toast } from '../../../components/toasts.tsx';
import { problemSentence } from '../../../lib/api/api-problem.ts';
import { useArchiveLibraryItem } from '../api/archive-library-item.ts';
import { saveLibraryFile } from '../hooks/save-library-file.ts';
import type { ItemDesk } from '../hooks/use-item-draft.ts';
import { SaveRevision } from './save-revision.tsx';

type Props = {
  workspaceId: string;
  item: LibraryItem;
  desk: ItemDesk;
  mayEdit: boolean;
  onConflict: () => Promise<unknown>;
};

/** What can be done with the part as a whole. */
export function ItemActions({ workspaceId, item, desk, mayEdit, onConflict }: Props) {
  return (
    <>
      <Button onClick={() => void saveLibraryFile(workspaceId, { itemId: item.id }, item.name)}>Export</Button>
      {mayEdit && <ArchiveAction workspaceId={workspaceId} item={item} />}
      {mayEdit && item.archivedAt === null && (
        <>
          {desk.isChanged && !desk.theirs && <DiscardAction item={item} desk={desk} />}
          <SaveRevision workspaceId={workspaceId} item={item} desk={desk} onConflict={onConflict} />
        </>
      )}
    </>
  );
}

function DiscardAction({ item, desk }: { item: LibraryItem; desk: ItemDesk }) {
  const discard = () => {
    const undo = desk.takeOver(item, 'discard your changes');
    toast(`You see revision ${item.revision} as it was saved.`, {
      action: { word: 'Bring my changes back', take: undo },
    });
  };
  return <Button onClick={discard}>Discard changes</Button>;
}

function ArchiveAction({ workspaceId, item }: { workspaceId: string; item: LibraryItem }) {
  const archive = useArchiveLibraryItem(workspaceId, item.id);
  if (item.archivedAt !== null) {
    const takeOut = () =>
      archive.mutateAsync(false).then(
        () => toast(`${item.name} is out of the archive.`),
        (error: unknown) => toast(`Not taken out. ${problemSentence(error)}`, { kind: 'stop' }),
      );
    return (
      <Button go busy={archive.isPending ? 'Taking it out' : undefined} onClick={() => void takeOut()}>
        Take out of the archive
      </Button>
    );
  }
  return (
    <ConfirmDialog
      title={`Put ${item.name} into the archive?`}
      about={`${holdWords(item.studyCount)} In the archive the part cannot be changed and is not offered to new studies. It can be taken out again.`}
      trigger={<Button>Archive</Button>}
      confirm="Archive"
      busy="Archiving"
      onConfirm={async () => {
        await archive.mutateAsync(true);
        toast(`${item.name} is in the archive.`);
      }}
    />
  );
}

function holdWords(studyCount: number): string {
  if (studyCount === 0) return 'No study uses it.';
  return studyCount === 1
    ? 'One study uses it and keeps what it took.'
    : `${studyCount} studies use it and keep what they took.`;
}
