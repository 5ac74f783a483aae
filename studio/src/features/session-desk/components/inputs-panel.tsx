import { memo } from 'react';
import { useDesk, useDispatch } from '../hooks/use-desk.ts';
import { CellSection } from './cell-section.tsx';
import { CoolingSection } from './cooling-section.tsx';
import { GuardsSection } from './guards-section.tsx';
import { SessionSection } from './session-section.tsx';
import { StationSection } from './station-section.tsx';
import { TaperSection } from './taper-section.tsx';
import { BoostSection, InletSection, PackSection } from './vehicle-sections.tsx';

/** Everything that describes a session, from the station to the cell. */
export const InputsPanel = memo(function InputsPanel() {
  return (
    <aside className="ins" aria-label="Inputs">
      <div className="ins-head">
        <h2>Inputs</h2>
        <span className="ins-about">station to cell</span>
        <UndoActions />
      </div>
      <div className="chain">
        <StationSection />
        <InletSection />
        <BoostSection />
        <PackSection />
        <TaperSection />
        <GuardsSection />
        <CellSection />
        <CoolingSection />
        <SessionSection />
      </div>
    </aside>
  );
});

/** The last change taken back, or made again. */
export function UndoActions() {
  const dispatch = useDispatch();
  const readOnly = useDesk((state) => state.readOnly);
  const last = useDesk((state) => state.past.at(-1)?.label);
  const next = useDesk((state) => state.future[0]?.label);
  if (readOnly) return null;
  return (
    <div className="ins-undo">
      <button
        type="button"
        className="lnk"
        aria-disabled={last === undefined}
        aria-label={last === undefined ? 'Undo: nothing to undo' : `Undo ${last}`}
        title={last && `Undo: ${last}`}
        onClick={() => dispatch({ type: 'undo' })}
      >
        Undo
      </button>
      <button
        type="button"
        className="lnk"
        aria-disabled={next === undefined}
        aria-label={next === undefined ? 'Redo: nothing to redo' : `Redo ${next}`}
        title={next && `Redo: ${next}`}
        onClick={() => dispatch({ type: 'redo' })}
      >
        Redo
      </button>
    </div>
  );
}
