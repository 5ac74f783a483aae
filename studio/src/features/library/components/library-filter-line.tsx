import { useEffect, useState } from 'react';
import { WordSwitch } from '../../../components/word-switch.tsx';
import { kindOrder, kindWords } from '../model/kinds.ts';
import type { LibraryFilters } from '../model/library-filters.ts';

const ALL = 'all';
const KINDS = [
  { value: ALL, label: 'all' },
  ...kindOrder.map((kind) => ({ value: kind, label: kindWords[kind].many })),
];
/** How long the hand rests before the server is asked. */
const REST_MS = 250;

type Props = { filters: LibraryFilters; onChange: (filters: LibraryFilters) => void };

/** Which parts are listed: by words, by kind. */
export function LibraryFilterLine({ filters, onChange }: Props) {
  return (
    <div className="reg-filters" role="search">
      <SearchField words={filters.q} onWords={(q) => onChange({ ...filters, q })} />
      <div className="reg-switch">
        <span className="reg-switch-name" aria-hidden="true">
          Kind
        </span>
        <WordSwitch
          label="Kind"
          value={filters.kind ?? ALL}
          options={KINDS}
          onChange={(kind) => {
            const { kind: _before, ...others } = filters;
            onChange(kind === ALL ? others : { ...others, kind: kind as NonNullable<LibraryFilters['kind']> });
          }}
        />
      </div>
    </div>
  );
}

function SearchField({ words, onWords }: { words: string; onWords: (words: string) => void }) {
  const [field, setField] = useState({ typed: words, words });
  // The address was changed from elsewhere: the field says what it says.
  if (field.words !== words) setField({ typed: words, words });
  const { typed } = field;
  // The clock: the address follows once the hand rests.
  useEffect(() => {
    if (typed === words) return;
    const timer = setTimeout(() => onWords(typed), REST_MS);
    return () => clearTimeout(timer);
  }, [typed, words, onWords]);
  return (
    <input
      type="search"
      className="reg-search"
      aria-label="Find by name, notes or source"
      placeholder="Find by name, notes or source"
      maxLength={200}
      value={typed}
      onChange={(event) => setField({ typed: event.target.value, words })}
    />
  );
}
