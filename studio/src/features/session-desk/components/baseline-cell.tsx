import { useDesk, useDispatch } from '../hooks/use-desk.ts';

/** What stands as baseline, and the words that change it. */
export function BaselineCell() {
  const dispatch = useDispatch();
  const readOnly = useDesk((state) => state.readOnly);
  const name = useDesk(({ sheet }) => sheet.baseline && (sheet.baselineName ?? (sheet.baseline.title || 'untitled')));
  if (name === null) return 'none';
  return (
    <span className="baseline-cell">
      <span className="baseline-title" title={name}>
        {name}
      </span>
      {!readOnly && (
        <button type="button" className="lnk" onClick={() => dispatch({ type: 'swap-baseline' })}>
          Swap
        </button>
      )}
      <button type="button" className="lnk" onClick={() => dispatch({ type: 'clear-baseline' })}>
        Clear
      </button>
    </span>
  );
}
