import type { LibraryItem } from '../../../../../server/src/contract/library.ts';
import { AsyncView } from '../../../components/async-view.tsx';
import { DifferenceList } from '../../../components/difference-list.tsx';
import { useUnits } from '../../../lib/units.ts';
import { useLibraryRevision } from '../api/read-library-revision.ts';
import type { Compared } from '../model/compared.ts';
import { itemDifferences } from '../model/item-content.ts';

type Props = {
  workspaceId: string;
  item: LibraryItem;
  pair: Compared | null;
  onCompare: (from: number, to: number) => void;
  onClose: () => void;
};

/** Two revisions, chosen by their numbers, and where they differ. */
export function CompareRevisions({ workspaceId, item, pair, onCompare, onClose }: Props) {
  const { from, to } = pair ?? { from: item.revision - 1, to: item.revision };
  return (
    <div className="compare">
      <div className="compare-choice">
        <RevisionChoice
          label="Compare revision"
          newest={item.revision}
          value={from}
          not={to}
          onChange={(one) => onCompare(one, to)}
        />
        <RevisionChoice
          label="with revision"
          newest={item.revision}
          value={to}
          not={from}
          onChange={(one) => onCompare(from, one)}
        />
        {pair ? (
          <button type="button" className="lnk" onClick={onClose}>
            Close the comparison
          </button>
        ) : (
          <button type="button" className="lnk" onClick={() => onCompare(from, to)}>
            Compare them
          </button>
        )}
      </div>
      {pair && <Differences workspaceId={workspaceId} item={item} {...pair} />}
    </div>
  );
}

type ChoiceProps = { label: string; newest: number; value: number; not: number; onChange: (revision: number) => void };

function RevisionChoice({ label, newest, value, not, onChange }: ChoiceProps) {
  const others = Array.from({ length: newest }, (_, i) => newest - i).filter((revision) => revision !== not);
  return (
    <label>
      {label}
      <select value={value} onChange={(event) => onChange(Number(event.target.value))}>
        {others.map((revision) => (
          <option key={revision} value={revision}>
            {revision}
          </option>
        ))}
      </select>
    </label>
  );
}

function Differences({ workspaceId, item, from, to }: Compared & { workspaceId: string; item: LibraryItem }) {
  const { temperatureUnit } = useUnits();
  const before = useLibraryRevision(workspaceId, item.id, from);
  const after = useLibraryRevision(workspaceId, item.id, to);
  return (
    <AsyncView query={before} loading={`Reading revision ${from}`}>
      {(old) => (
        <AsyncView query={after} loading={`Reading revision ${to}`}>
          {(next) => {
            const differences = itemDifferences(item.kind, old, next, temperatureUnit);
            if (differences.length === 0) return <p className="item-quiet">The two say the same.</p>;
            return (
              <DifferenceList
                differences={differences}
                before={`Revision ${from}`}
                after={`Revision ${to}`}
                caption={`What differs between revisions ${from} and ${to}`}
              />
            );
          }}
        </AsyncView>
      )}
    </AsyncView>
  );
}
