import { FormField } from '../../../components/form/form-field.tsx';
import type { ItemDraft } from '../model/kept-item.ts';

type Props = {
  draft: Pick<ItemDraft, 'notes' | 'source'>;
  readOnly: boolean;
  onWords: (words: Partial<Pick<ItemDraft, 'notes' | 'source'>>) => void;
};

/** Where the values come from, and what else is worth knowing. */
export function NotesAndSource({ draft: { notes, source }, readOnly, onWords }: Props) {
  if (readOnly) {
    return (
      <dl className="item-words">
        <dt>Source</dt>
        <dd>{source || <span className="text-ink3">not named</span>}</dd>
        <dt>Notes</dt>
        <dd>{notes || <span className="text-ink3">none</span>}</dd>
      </dl>
    );
  }
  return (
    <div className="form">
      <FormField label="Source" hint="Where the values come from">
        <input maxLength={1000} value={source} onChange={(event) => onWords({ source: event.target.value })} />
      </FormField>
      <FormField label="Notes">
        <textarea maxLength={4000} value={notes} onChange={(event) => onWords({ notes: event.target.value })} />
      </FormField>
    </div>
  );
}
