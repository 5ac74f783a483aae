import { studiesWord } from '../model/row-words.ts';

type Props = {
  /** Rows that are not shown yet. */
  below: number;
  isReading: boolean;
  /** Why the last page did not come; null where it did. */
  problem: string | null;
  onMore: () => void;
  isArchive: boolean;
  archivedTotal: number;
  onArchive: (isArchive: boolean) => void;
};

/** What lies below the last row, and the way into the archive and out of it. */
export function RegisterFoot({ below, isReading, problem, onMore, isArchive, archivedTotal, onArchive }: Props) {
  return (
    <div className="studies-foot">
      {problem && (
        <p className="text-stop" role="alert">
          The next rows did not come. {problem}
        </p>
      )}
      <p>
        {below > 0 && (
          <>
            <button className="lnk" aria-disabled={isReading || undefined} onClick={isReading ? undefined : onMore}>
              {isReading ? `Reading ${below} more` : `${below} more below`}
            </button>
            {'. '}
          </>
        )}
        {isArchive ? (
          <button className="lnk" onClick={() => onArchive(false)}>
            Leave the archive
          </button>
        ) : archivedTotal > 0 ? (
          <>
            <button className="lnk" onClick={() => onArchive(true)}>
              Show the archive
            </button>
            , {studiesWord(archivedTotal)}.
          </>
        ) : null}
      </p>
    </div>
  );
}
