import type { LibraryItem } from '../../../../../server/src/contract/library.ts';
import { Button } from '../../../components/button.tsx';
import { DifferenceList } from '../../../components/difference-list.tsx';
import { Notice } from '../../../components/notice.tsx';
import { toast } from '../../../components/toasts.tsx';
import { formatAgo } from '../../../lib/moments.ts';
import type { Difference } from '../../../lib/study-differences.ts';
import { useUnits } from '../../../lib/units.ts';
import { useNow } from '../../../lib/use-now.ts';
import type { ItemDesk } from '../hooks/use-item-draft.ts';
import { itemDifferences } from '../model/item-content.ts';

type Props = { desk: ItemDesk; theirs: LibraryItem };

/** Somebody saved a revision while this one was being changed: what each changed, and the choice. */
export function ConflictPanel({ desk, theirs }: Props) {
  const { temperatureUnit } = useUnits();
  const now = useNow();
  const { base, draft } = desk;
  const who = theirs.changedBy?.name ?? 'Somebody';
  const take = () => {
    const undo = desk.takeOver(theirs, `take revision ${theirs.revision}`);
    toast(`You see revision ${theirs.revision} now.`, { action: { word: 'Bring my changes back', take: undo } });
  };
  return (
    <section className="conflict" aria-label="Two people changed this part">
      <Notice kind="stop">
        {`${who} saved revision ${theirs.revision} ${formatAgo(theirs.changedAt, new Date(now))}, while you were changing revision ${base.revision}. Nothing of yours is lost.`}
      </Notice>
      <Changes
        title={`Changed in revision ${theirs.revision}`}
        differences={itemDifferences(theirs.kind, base, theirs, temperatureUnit)}
        before={`Revision ${base.revision}`}
        after={`Revision ${theirs.revision}`}
      />
      <Changes
        title="Changed by you"
        differences={itemDifferences(theirs.kind, base, draft, temperatureUnit)}
        before={`Revision ${base.revision}`}
        after="Yours"
      />
      <div className="form-actions">
        <Button go onClick={() => desk.keepMine(theirs)}>
          Keep mine on top of theirs
        </Button>
        <Button onClick={take}>Take theirs</Button>
      </div>
      <p className="item-quiet">
        Keeping yours makes your changes again on their revision and saves nothing yet; where both changed the same,
        yours stands. Taking theirs leaves yours under undo.
      </p>
    </section>
  );
}

type ChangesProps = { title: string; differences: readonly Difference[]; before: string; after: string };

function Changes({ title, differences, ...sides }: ChangesProps) {
  return (
    <div>
      <h2>{title}</h2>
      {differences.length === 0 ? (
        <p className="item-quiet">Only entries that wait to be mended.</p>
      ) : (
        <DifferenceList differences={differences} {...sides} caption={title} />
      )}
    </div>
  );
}
