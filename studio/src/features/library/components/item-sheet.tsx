import { useRef, type RefObject } from 'react';
import type { LibraryItem } from '../../../../../server/src/contract/library.ts';
import { Notice } from '../../../components/notice.tsx';
import { useItemDraft } from '../hooks/use-item-draft.ts';
import type { PartEditorHandle, PartEntry, SessionPartEditor } from '../model/part-editor.ts';
import { ConflictPanel } from './conflict-panel.tsx';
import { HistorySection } from './history-section.tsx';
import { ItemActions } from './item-actions.tsx';
import { ItemTitleBlock } from './item-title-block.tsx';
import { LeaveGuard } from './leave-guard.tsx';
import { NotesAndSource } from './notes-and-source.tsx';
import { TripPartEditor } from './trip-part-editor.tsx';
import { UseSection } from './use-section.tsx';

type Props = {
  workspaceId: string;
  item: LibraryItem;
  mayEdit: boolean;
  /** The editor of what a session is made of. */
  SessionPartEditor: SessionPartEditor;
  /** Has the newest revision asked for. */
  onRefresh: () => Promise<unknown>;
};

/** One part on one sheet: its inputs, where they come from, its history, and who relies on it. */
export function ItemSheet({ workspaceId, item, mayEdit, SessionPartEditor, onRefresh }: Props) {
  const editor = useRef<PartEditorHandle>(null);
  const desk = useItemDraft(workspaceId, item, editor);
  const { base, draft, isChanged, theirs } = desk;
  const readOnly = !mayEdit || item.archivedAt !== null;
  const actions = (
    <ItemActions workspaceId={workspaceId} item={item} desk={desk} mayEdit={mayEdit} onConflict={onRefresh} />
  );
  return (
    <>
      <ItemTitleBlock
        item={item}
        name={readOnly ? item.name : draft.name}
        isChanged={isChanged}
        isKept={desk.isKept}
        readOnly={readOnly}
        onName={desk.setName}
        actions={actions}
      />
      <div className="item-sheet">
        {item.archivedAt !== null && (
          <Notice>In the archive: studies keep what they took from it, and new ones are not offered it.</Notice>
        )}
        {theirs && !readOnly && <ConflictPanel desk={desk} theirs={theirs} />}
        <Editor
          // What may only be read is the newest revision, whatever waits in this browser.
          key={readOnly ? `read ${item.revision}` : 'edit'}
          workspaceId={workspaceId}
          kind={item.kind}
          initial={readOnly ? { body: item.body, pending: {} } : { body: draft.body, pending: draft.pending }}
          saved={readOnly ? null : base.body}
          readOnly={readOnly}
          onChange={desk.setPart}
          editor={editor}
          SessionPartEditor={SessionPartEditor}
        />
        <section className="page-part" aria-labelledby="words-title">
          <h2 id="words-title">Source and notes</h2>
          <NotesAndSource draft={readOnly ? item : draft} readOnly={readOnly} onWords={desk.setWords} />
        </section>
        <HistorySection workspaceId={workspaceId} item={item} mayRestore={!readOnly} isChanged={isChanged} />
        <UseSection workspaceId={workspaceId} item={item} />
      </div>
      <LeaveGuard isChanged={isChanged && !readOnly} />
    </>
  );
}

type EditorProps = {
  workspaceId: string;
  kind: LibraryItem['kind'];
  initial: PartEntry;
  saved: LibraryItem['body'] | null;
  readOnly: boolean;
  onChange: (entry: PartEntry) => void;
  editor: RefObject<PartEditorHandle | null>;
  SessionPartEditor: SessionPartEditor;
};

function Editor({ workspaceId, kind, editor, SessionPartEditor: Session, ...common }: EditorProps) {
  if (kind === 'vehicle' || kind === 'route')
    return <TripPartEditor {...common} kind={kind} ref={editor} workspaceId={workspaceId} />;
  return <Session {...common} kind={kind} ref={editor} />;
}
