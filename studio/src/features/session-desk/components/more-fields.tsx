import { useId, type ReactNode } from 'react';
import { isWithin } from '../../../lib/study-path.ts';
import { changesOf, issuesOf } from '../model/derived.ts';
import type { FieldSpec } from '../model/input-sections.ts';
import { useDesk, useDispatch } from '../hooks/use-desk.ts';
import { QuantityFields } from './quantity-field.tsx';

type Props = {
  name: string;
  fields: FieldSpec[];
  /** Stands before the fields and counts as one: a name. */
  first?: ReactNode;
};

/** Inputs that are seldom touched, behind one line that says whether one of them is changed or needs mending. */
export function MoreFields({ name, fields, first }: Props) {
  const id = useId();
  const dispatch = useDispatch();
  const unfolded = useDesk((state) => state.view.unfolded);
  const open = unfolded.includes(name);
  const paths = fields.map((field) => field.path);
  const changed = useDesk(
    ({ sheet }) => paths.filter((path) => changesOf(sheet).some((at) => isWithin(path, at))).length,
  );
  const wrong = useDesk(({ sheet }) => issuesOf(sheet.draft).some((issue) => paths.includes(issue.path)));
  const count = fields.length + (first ? 1 : 0);
  if (count === 0) return null;
  const toggle = () =>
    dispatch({ type: 'view', view: { unfolded: open ? unfolded.filter((one) => one !== name) : [...unfolded, name] } });
  const state = [changed > 0 && `${changed} changed`, wrong && 'one needs mending'].filter(Boolean).join(', ');
  return (
    <>
      <button type="button" className="lnk" aria-expanded={open} aria-controls={id} onClick={toggle}>
        {open ? 'Fewer inputs' : `${count} more ${count === 1 ? 'input' : 'inputs'}`}
      </button>
      {state && !open && <span className="more-state">{state}</span>}
      <div id={id} hidden={!open}>
        {open && first}
        {open && <QuantityFields fields={fields} />}
      </div>
    </>
  );
}
