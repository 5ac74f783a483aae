import { partSchemas } from '@voltiplano/engine';
import { useEffect, useImperativeHandle, useMemo, useReducer, useRef, useState, type KeyboardEvent } from 'react';
import { ReadOnlyFields } from '../../../components/fields/read-only.ts';
import { TripPartContext, type TripPartDesk } from '../hooks/trip-part-context.ts';
import type { PartEditorProps } from '../model/part-editor.ts';
import { freshHistory, historyReducer, type HistoryAction, type PartHistory } from '../model/part-history.ts';
import {
  entryOf,
  shownPart,
  tripPartIssues,
  tripPartOf,
  withPartValue,
  type TripPartKind,
} from '../model/trip-part.ts';
import { RouteInputs } from './route-inputs.tsx';
import { VehicleInputs } from './vehicle-inputs.tsx';

type Props = PartEditorProps<TripPartKind> & { workspaceId: string };

/** A vehicle or a route: its inputs, with undo; what breaks a rule waits as it was typed. */
export function TripPartEditor({ kind, initial, saved, readOnly = false, onChange, ref, workspaceId }: Props) {
  const [history, dispatch] = useReducer(historyReducer, initial, (entry) => freshHistory(tripPartOf(entry)));
  const [baseline, setBaseline] = useState(saved);
  const { part } = history;
  useReport(history, onChange);
  useImperativeHandle(
    ref,
    () => ({
      replace: (body, label) => dispatch({ type: 'change', change: () => ({ body, typed: null }), label }),
      // These kinds have no name in their body.
      rename: () => undefined,
      compareWith: setBaseline,
    }),
    [],
  );
  const desk = useMemo((): TripPartDesk => {
    const { success, data } = partSchemas[kind].safeParse(part.body);
    return {
      kind,
      shown: shownPart(part),
      filled: success ? data : part.body,
      saved: baseline,
      issues: tripPartIssues(kind, part),
      put: (path, value, label, typingAt) =>
        dispatch({
          type: 'change',
          change: (before) => withPartValue(kind, before, path, value),
          label,
          ...(typingAt ? { typingAt } : {}),
        }),
      leaveField: () => dispatch({ type: 'leave-field' }),
    };
  }, [kind, part, baseline]);
  return (
    <TripPartContext value={desk}>
      <ReadOnlyFields value={readOnly}>
        <div className="trip-editor" role="group" aria-label="Inputs" onKeyDown={(event) => undoByKey(event, dispatch)}>
          <div className="trip-editor-head">
            <h2>Inputs</h2>
            {!readOnly && <UndoWords history={history} dispatch={dispatch} />}
          </div>
          {kind === 'vehicle' ? <VehicleInputs /> : <RouteInputs workspaceId={workspaceId} />}
        </div>
      </ReadOnlyFields>
    </TripPartContext>
  );
}

/** Tells the page that holds the editor of every change of the part. */
function useReport({ part }: PartHistory, onChange: Props['onChange']): void {
  const told = useRef(part);
  // Speaks to the page that holds the editor.
  useEffect(() => {
    if (told.current === part) return;
    told.current = part;
    onChange?.(entryOf(part));
  }, [part, onChange]);
}

type Dispatch = (action: HistoryAction) => void;

function UndoWords({ history: { past, future }, dispatch }: { history: PartHistory; dispatch: Dispatch }) {
  const words = [
    { word: 'Undo', type: 'undo', label: past.at(-1)?.label },
    { word: 'Redo', type: 'redo', label: future[0]?.label },
  ] as const;
  return words.map(({ word, type, label }) => (
    <button
      key={type}
      type="button"
      className="lnk"
      aria-disabled={label === undefined}
      aria-label={label === undefined ? `${word}: nothing to ${type}` : `${word} ${label}`}
      title={label && `${word}: ${label}`}
      onClick={() => dispatch({ type })}
    >
      {word}
    </button>
  ));
}

/** Ctrl+Z and Ctrl+Y reach the whole part, not the text of one field. */
function undoByKey(event: KeyboardEvent, dispatch: Dispatch): void {
  if (!(event.ctrlKey || event.metaKey) || event.altKey) return;
  const key = event.key.toLowerCase();
  if (key !== 'z' && key !== 'y') return;
  event.preventDefault();
  dispatch({ type: key === 'y' || event.shiftKey ? 'redo' : 'undo' });
}
