import { TitleInput } from '../../../components/title-input.tsx';
import { useDesk, useDispatch } from '../hooks/use-desk.ts';

/** The study's title, which is its heading too. */
export function TitleField() {
  const dispatch = useDispatch();
  const title = useDesk(({ sheet }) => sheet.draft.study.title ?? '');
  const readOnly = useDesk((state) => state.readOnly);
  const set = (text: string) =>
    dispatch({
      type: 'parts',
      parts: [{ path: 'title', value: text || undefined }],
      label: 'title',
      typingAt: 'title',
    });
  if (readOnly) return <h1>{title || 'Untitled session'}</h1>;
  return (
    <>
      <h1 className="unseen">{title || 'Untitled session'}</h1>
      <TitleInput
        label="Title"
        value={title}
        placeholder="Untitled session"
        maxLength={300}
        onText={set}
        onLeave={() => dispatch({ type: 'leave-field' })}
      />
    </>
  );
}
