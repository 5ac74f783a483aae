import type { ReactNode } from 'react';
import { TitleBlock } from '../../../components/title-block.tsx';
import { useDesk, useDeskStore, useDispatch } from '../hooks/use-desk.ts';
import { useKeptDesk } from '../hooks/use-kept-desk.ts';
import { changesOf } from '../model/derived.ts';

type Props = { actions: ReactNode };

/** Title, baseline, how much has changed against it, and whether it is kept. */
export function DeskTitleBlock({ actions }: Props) {
  const baseline = useDesk(({ sheet }) => sheet.baseline);
  const changed = useDesk(({ sheet }) => changesOf(sheet).length);
  const cells = [
    { label: 'Baseline', value: <BaselineCell title={baseline && (baseline.title || 'untitled')} /> },
    { label: 'Changed', value: baseline ? `${changed} ${changed === 1 ? 'input' : 'inputs'}` : 'no baseline' },
    { label: 'Kept', value: <KeptWords /> },
  ];
  return <TitleBlock kind="Session study" title={<TitleField />} cells={cells} actions={actions} />;
}

function TitleField() {
  const dispatch = useDispatch();
  const title = useDesk(({ sheet }) => sheet.draft.study.title ?? '');
  const set = (text: string) => {
    // The field wraps, but a title is one line, also where it is pasted.
    const value = text.replace(/\s*\n\s*/g, ' ') || undefined;
    dispatch({ type: 'parts', parts: [{ path: 'title', value }], label: 'title', typingAt: 'title' });
  };
  return (
    <>
      <h1 className="unseen">{title || 'Untitled session'}</h1>
      <span className="desk-title" data-text={title}>
        <textarea
          aria-label="Title"
          rows={1}
          value={title}
          placeholder="Untitled session"
          maxLength={300}
          spellCheck={false}
          onChange={(event) => set(event.target.value)}
          onKeyDown={(event) => {
            if (event.key !== 'Enter') return;
            event.preventDefault();
            event.currentTarget.blur();
          }}
          onBlur={() => dispatch({ type: 'leave-field' })}
        />
      </span>
    </>
  );
}

function KeptWords() {
  return <span role="status">{useKeptDesk(useDeskStore())}</span>;
}

function BaselineCell({ title }: { title: string | null }) {
  const dispatch = useDispatch();
  if (title === null) return 'none';
  return (
    <span className="baseline-cell">
      <span className="baseline-title" title={title}>
        {title}
      </span>
      <button type="button" className="lnk" onClick={() => dispatch({ type: 'swap-baseline' })}>
        Swap
      </button>
      <button type="button" className="lnk" onClick={() => dispatch({ type: 'clear-baseline' })}>
        Clear
      </button>
    </span>
  );
}
