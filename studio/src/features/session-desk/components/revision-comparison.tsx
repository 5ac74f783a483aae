import { useQuery } from '@tanstack/react-query';
import { useId } from 'react';
import type { StudyFile } from '../../../../../server/src/contract/study.ts';
import { AsyncView } from '../../../components/async-view.tsx';
import { DifferenceList } from '../../../components/difference-list.tsx';
import { studyDifferences } from '../../../lib/study-differences.ts';
import { useUnits } from '../../../lib/units.ts';
import { revisionQuery } from '../api/revision-queries.ts';
import type { StudyPlace } from '../api/study-query.ts';
import { useHistoryPlace } from '../hooks/use-history-place.ts';

type Side = number | 'now';
type Props = { place: StudyPlace; revision: number; newest: number; now: () => StudyFile };

/** What changed between a revision and another, by default the one before. */
export function RevisionComparison({ place, revision, newest, now }: Props) {
  const { against: asked, look } = useHistoryPlace();
  const against: Side = asked !== null && asked !== revision ? asked : revision > 1 ? revision - 1 : 'now';
  const id = useId();
  const others: Side[] = ['now', ...Array.from({ length: newest }, (_, i) => newest - i)];
  return (
    <div className="comparison">
      <label htmlFor={id}>
        {`Revision ${revision} against `}
        <select
          id={id}
          value={against}
          onChange={(event) => look(revision, event.target.value === 'now' ? 'now' : Number(event.target.value))}
        >
          {others
            .filter((one) => one !== revision)
            .map((one) => (
              <option key={one} value={one}>
                {one === 'now' ? 'what is worked on now' : `revision ${one}`}
              </option>
            ))}
        </select>
      </label>
      <Compared place={place} revision={revision} against={against} now={now} />
    </div>
  );
}

type ComparedProps = { place: StudyPlace; revision: number; against: Side; now: () => StudyFile };

function Compared({ place, revision, against, now }: ComparedProps) {
  const { temperatureUnit } = useUnits();
  const one = useQuery(revisionQuery(place, revision));
  const isNow = against === 'now';
  const other = useQuery({ ...revisionQuery(place, isNow ? revision : against) });
  return (
    <AsyncView query={one} loading="Reading the revision.">
      {({ inputs }) => (
        <AsyncView query={other} loading="Reading the other revision.">
          {(found) => {
            const sides = [
              { name: `Revision ${revision}`, order: revision, inputs },
              isNow
                ? { name: 'now', order: Infinity, inputs: now() }
                : { name: `Revision ${against}`, order: against, inputs: found.inputs },
            ].sort((a, b) => a.order - b.order);
            const [before, after] = sides as [(typeof sides)[number], (typeof sides)[number]];
            const differences = studyDifferences(before.inputs, after.inputs, temperatureUnit);
            if (differences.length === 0) return <p className="text-label text-ink2">No input differs.</p>;
            const caption = `What changed from ${before.name} to ${after.name}`;
            return (
              <DifferenceList differences={differences} before={before.name} after={after.name} caption={caption} />
            );
          }}
        </AsyncView>
      )}
    </AsyncView>
  );
}
