import type { ReactNode } from 'react';
import { useReadOnly } from '../../../components/fields/read-only.ts';
import { useDesk, useDispatch } from '../hooks/use-desk.ts';
import { newParts } from '../model/input-sections.ts';
import { valueAt } from '../../../lib/study-path.ts';
import type { Part } from '../model/draft.ts';

type Props = {
  path: keyof typeof newParts;
  /** What it is called in "Add a chiller", "Remove the chiller". */
  noun: string;
  /** Empty for what is not counted. */
  article?: 'a' | 'an' | '';
  /** What is so while the part is not there. */
  without: string;
  /** Further parts that go when this one goes. */
  goWith?: Part[];
  children: ReactNode;
};

/** A part that a study may be without: a button adds it with usual values, another takes it away; both can be undone. */
export function OptionalPart({ path, noun, article = 'a', without, goWith = [], children }: Props) {
  const dispatch = useDispatch();
  const present = useDesk(({ sheet }) => valueAt(sheet.draft.study, path) !== undefined);
  const readOnly = useReadOnly();
  const what = [article, noun].filter(Boolean).join(' ');
  const set = (value: unknown, label: string, others: Part[] = []) =>
    dispatch({ type: 'parts', parts: [{ path, value }, ...others], label });
  if (!present)
    return (
      <p className="without">
        <span>{without}</span>
        {!readOnly && (
          <button type="button" className="lnk" onClick={() => set(newParts[path], `add ${what}`)}>
            {`Add ${what}`}
          </button>
        )}
      </p>
    );
  if (readOnly) return children;
  return (
    <>
      {children}
      <p className="remove">
        <button
          type="button"
          className="lnk"
          onClick={() => set(undefined, `remove ${article ? 'the ' : ''}${noun}`, goWith)}
        >
          {`Remove ${article ? 'the ' : ''}${noun}`}
        </button>
      </p>
    </>
  );
}
