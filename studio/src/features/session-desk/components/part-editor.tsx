import '../../../lib/zod-without-eval.ts';
import '../session-desk.css';
import './part-editor.css';
import { partIssues } from '@voltiplano/engine';
import { useEffect, useImperativeHandle, type KeyboardEvent, type Ref } from 'react';
import { ReadOnlyFields } from '../../../components/fields/read-only.ts';
import { Notice } from '../../../components/notice.tsx';
import { RunContext } from '../hooks/run-context.ts';
import { useDeskRuns } from '../hooks/use-desk-runs.ts';
import { DeskContext } from '../hooks/use-desk.ts';
import { usePartStore, type OpenedPart } from '../hooks/use-part-store.ts';
import type { PartBody, SessionPartKind } from '../model/carriers.ts';
import { entriesOf, type PartEntry, type PartStore } from '../model/part-store.ts';
import { UndoActions } from './inputs-panel.tsx';
import { PartPreview } from './part-preview.tsx';
import { PartSections } from './part-sections.tsx';

/** What a page can do to the part that is being edited. */
export type PartEditorHandle = {
  /** Puts another part in place; the one before stays under undo. */
  replace: (body: PartBody, label: string) => void;
  /** Gives the part its name, where its kind has one. */
  rename: (name: string) => void;
  /** What changes are marked against from now on. */
  compareWith: (saved: PartBody) => void;
};

type Props = {
  kind: SessionPartKind;
  /** What the editor begins with, as `onChange` once told it; later changes come through the handle. */
  initial: { body: PartBody; pending: Record<string, unknown> };
  /** What changes are marked against; null where the part is new. */
  saved: PartBody | null;
  readOnly?: boolean;
  /** The part after a change, and the entries that break a rule and wait. */
  onChange?: (entry: PartEntry) => void;
  ref?: Ref<PartEditorHandle>;
};

/** One part of a study with the desk's own inputs, and what it does on an example that carries it. */
export function PartEditor(props: Props) {
  const issues = partIssues(props.kind, props.initial.body);
  if (issues.length === 0) return <ReadablePart {...props} />;
  return (
    <Notice kind="stop">
      <p>This part does not stand up to the rules of this version:</p>
      {issues.map(({ message }) => (
        <p key={message}>{message}</p>
      ))}
    </Notice>
  );
}

function ReadablePart(props: Props) {
  const { body, pending } = props.initial;
  const opened = usePartStore(props.kind, { body, pending: entriesOf(pending) }, props.saved);
  const { store, carrier, failed, carryOn } = opened;
  if (store) return <OpenPart {...props} opened={opened} store={store} />;
  if (!failed) return <p className="awaited">Opening the part</p>;
  return (
    <Notice
      kind="stop"
      action={
        <button type="button" className="lnk" onClick={() => carryOn(carrier)}>
          Try again
        </button>
      }
    >
      The inputs could not be opened: the example that carries the part could not be fetched.
    </Notice>
  );
}

function OpenPart({
  kind,
  readOnly = false,
  onChange,
  ref,
  opened,
  store,
}: Props & { opened: OpenedPart; store: PartStore }) {
  const runs = useDeskRuns(store);
  useImperativeHandle(ref, () => handleOf(store, kind), [store, kind]);
  // Tells the page that holds the editor.
  useEffect(() => {
    let told = store.entry();
    return store.subscribe(() => {
      if (store.entry() === told) return;
      told = store.entry();
      onChange?.(told);
    });
  }, [store, onChange]);
  return (
    <DeskContext value={store}>
      <RunContext value={runs}>
        <ReadOnlyFields value={readOnly}>
          <div className="part-editor" onKeyDown={(event) => undoByKey(event, store)}>
            <div className="part-inputs" role="group" aria-label="Inputs">
              <div className="ins-head">
                <h2>Inputs</h2>
                {!readOnly && <UndoActions />}
              </div>
              <div className="chain">
                <PartSections kind={kind} />
              </div>
            </div>
            <PartPreview kind={kind} carrier={opened.carrier} onCarrier={opened.carryOn} failed={opened.failed} />
          </div>
        </ReadOnlyFields>
      </RunContext>
    </DeskContext>
  );
}

function handleOf(store: PartStore, kind: SessionPartKind): PartEditorHandle {
  const path = `${kind}.name`;
  return {
    replace: store.replace,
    compareWith: store.compareWith,
    rename: (name) => store.dispatch({ type: 'parts', parts: [{ path, value: name }], label: 'name', typingAt: path }),
  };
}

/** Ctrl+Z and Ctrl+Y reach the whole part, not the text of one field. */
function undoByKey(event: KeyboardEvent, store: PartStore): void {
  if (!(event.ctrlKey || event.metaKey) || event.altKey) return;
  const key = event.key.toLowerCase();
  if (key !== 'z' && key !== 'y') return;
  event.preventDefault();
  store.dispatch({ type: key === 'y' || event.shiftKey ? 'redo' : 'undo' });
}
