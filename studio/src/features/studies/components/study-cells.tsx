import { Link } from 'react-router-dom';
import type { StudyRow } from '../../../../../server/src/contract/study.ts';
import { SectionThumbnail } from '../../../charts/section-thumbnail.tsx';
import { Moment } from '../../../components/moment.tsx';
import { StateWithRevision } from '../../../components/study-state.tsx';
import { formatHoursAndMinutes, formatQuantity } from '../../../lib/format.ts';
import { useUnits } from '../../../lib/units.ts';
import { partsLine } from '../model/row-words.ts';

/** Minutes that every section stands over, so that rows can be compared. */
export const SECTION_MIN = 180;

/** Title, over what the study is made of. The link covers the row. */
export function TitleCell({ row }: { row: StudyRow }) {
  return (
    <>
      <Link className="row-link" to={row.id}>
        {row.title || 'Untitled'}
      </Link>
      <div className="parts">
        {partsLine(row)}
        {row.archivedAt && (
          <>
            , archived <Moment at={row.archivedAt} />
          </>
        )}
      </div>
    </>
  );
}

/** The section, or in words why there is none. */
export function SectionCell({ row: { kind, headline }, width }: { row: StudyRow; width: number }) {
  const { failure, section, numbers } = headline;
  if (failure !== null) return <p className="failure">{failure}</p>;
  if (section && width > 0) return <SectionThumbnail section={section} width={width} untilMin={SECTION_MIN} />;
  if (kind === 'trip' && numbers)
    return <p className="instead">Door to door in {formatHoursAndMinutes(numbers.endMin)}</p>;
  return null;
}

/** A headline number, set large; null, where the run did not come to it, in words. */
function Figure({ kind, value }: { kind: 'min' | 'temperature'; value: number | null }) {
  const text = formatQuantity(kind, value);
  return value === null ? <span className="instead">{text}</span> : <span className="figure">{text}</span>;
}

export function MinutesCell({ row: { kind, headline } }: { row: StudyRow }) {
  if (headline.numbers === null || kind === 'trip') return null;
  return (
    <>
      <Figure kind="min" value={headline.numbers.minutes10To80} />
      <span className="narrow-unit">{headline.numbers.minutes10To80 === null ? '10–80 % ' : 'min, 10–80 %'}</span>
    </>
  );
}

export function CoreCell({ row: { headline } }: { row: StudyRow }) {
  const { temperature } = useUnits();
  if (headline.numbers === null) return null;
  const { hottestCoreC } = headline.numbers;
  return <Figure kind="temperature" value={hottestCoreC === null ? null : temperature(hottestCoreC)} />;
}

export function StateCell({ row: { state, revision, isChanged } }: { row: StudyRow }) {
  return (
    <>
      <StateWithRevision state={state} revision={revision} />
      {isChanged && <div className="changed-since">changed since</div>}
    </>
  );
}

/** By the pointer alone a second way into the study, so that the whole moment can be shown under it. */
export function ChangedCell({ row: { id, changedAt } }: { row: StudyRow }) {
  return (
    <Link to={id} tabIndex={-1} className="row-over">
      <Moment at={changedAt} />
    </Link>
  );
}
