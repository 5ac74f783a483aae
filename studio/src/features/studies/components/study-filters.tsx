import { useCallback, useId, useRef, type ReactNode } from 'react';
import { studyKinds, studyStates } from '../../../../../server/src/contract/study-words.ts';
import { WordSwitch } from '../../../components/word-switch.tsx';
import { stateWords } from '../../../lib/study-names.ts';
import { useWorkspace } from '../../../lib/session/use-workspace.ts';
import { useMembers } from '../api/list-members.ts';
import type { ChangeView } from '../hooks/use-list-view.ts';
import { useSearchText } from '../hooks/use-search-text.ts';
import { useSlash } from '../hooks/use-slash.ts';
import { sorts, type ListView, type SortBy } from '../model/list-view.ts';

const kinds = [{ value: 'all' as const }, ...studyKinds.map((value) => ({ value }))];
const states = [{ value: 'any' as const }, ...studyStates.map((value) => ({ value, label: stateWords[value] }))];

type Props = { view: ListView; onChange: ChangeView };

/** Search, kind, state and owner; on narrower sheets also the order, whose heads are not all shown there. */
export function StudyFilters({ view, onChange }: Props) {
  return (
    <search className="studies-filters" aria-label="Studies">
      <SearchField key="search" q={view.q} onChange={onChange} />
      <Group caption="Kind">
        <WordSwitch label="Kind" value={view.kind} options={kinds} onChange={(kind) => onChange({ kind })} />
      </Group>
      <Group caption="State">
        <WordSwitch label="State" value={view.state} options={states} onChange={(state) => onChange({ state })} />
      </Group>
      <div className="choices">
        <OwnerChoice owner={view.owner} onChange={(owner) => onChange({ owner })} />
        <SortChoice view={view} onChange={onChange} />
      </div>
    </search>
  );
}

function Group({ caption, children }: { caption: string; children: ReactNode }) {
  return (
    <div className="group">
      <span className="caption" aria-hidden="true">
        {caption}
      </span>
      {children}
    </div>
  );
}

function SearchField({ q, onChange }: { q: string; onChange: ChangeView }) {
  const field = useRef<HTMLInputElement>(null);
  const [typed, setTyped] = useSearchText(
    q,
    useCallback((text) => onChange({ q: text }, true), [onChange]),
  );
  useSlash(field);
  return (
    <input
      ref={field}
      type="search"
      className="find"
      aria-label="Find a study"
      aria-keyshortcuts="/"
      placeholder="Find by title, pack, station or person"
      maxLength={200}
      value={typed}
      onChange={(event) => setTyped(event.target.value)}
    />
  );
}

function OwnerChoice({ owner, onChange }: { owner: string; onChange: (owner: string) => void }) {
  const { workspaceId, person } = useWorkspace();
  const { data } = useMembers(workspaceId);
  const others = (data?.items ?? []).filter(({ personId }) => personId !== person.id);
  const isKnown = ['any', 'mine'].includes(owner) || others.some(({ personId }) => personId === owner);
  const id = useId();
  return (
    <div className="group">
      <label className="caption" htmlFor={id}>
        Owner
      </label>
      <select id={id} value={owner} onChange={(event) => onChange(event.target.value)}>
        <option value="any">any</option>
        <option value="mine">mine</option>
        {others.map(({ personId, name }) => (
          <option key={personId} value={personId}>
            {name}
          </option>
        ))}
        {!isKnown && <option value={owner}>{data ? 'somebody who left' : 'reading the members'}</option>}
      </select>
    </div>
  );
}

function SortChoice({ view: { sort, order }, onChange }: Props) {
  const id = useId();
  return (
    <div className="group sort-choice">
      <label className="caption" htmlFor={id}>
        Order
      </label>
      <select
        id={id}
        value={`${sort} ${order}`}
        onChange={(event) => {
          const [by, direction] = event.target.value.split(' ') as [SortBy, ListView['order']];
          onChange({ sort: by, order: direction });
        }}
      >
        {(Object.keys(sorts) as SortBy[]).flatMap((by) =>
          [sorts[by].first, sorts[by].first === 'asc' ? ('desc' as const) : ('asc' as const)].map((direction) => (
            <option key={`${by} ${direction}`} value={`${by} ${direction}`}>
              {sorts[by].words[direction]}
            </option>
          )),
        )}
      </select>
    </div>
  );
}
