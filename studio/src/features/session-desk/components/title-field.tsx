import { useDesk, useDispatch } from '../hooks/use-desk.ts';

/** The study's title, which is its heading too. */
export function TitleField() {
  const dispatch = useDispatch();
  const title = useDesk(({ sheet }) => sheet.draft.study.title ?? '');
  const readOnly = useDesk((state) => state.readOnly);
  const set = (text: string) => {
    // The field wraps, but a title is one line, also where it is pasted.
    const value = text.replace(/\s*\n\s*/g, ' ') || undefined;
    dispatch({ type: 'parts', parts: [{ path: 'title', value }], label: 'title', typingAt: 'title' });
  };
  if (readOnly) return <h1>{title || 'Untitled session'}</h1>;
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
