import { Link } from 'react-router-dom';
import { IssueTable } from '../../../components/issue-table.tsx';
import { useWorkspace } from '../../../lib/session/use-workspace.ts';
import type { ImportEntry } from '../model/import-list.ts';

type Props = { entry: ImportEntry; onLeaveOut: (() => void) | undefined };

/** One file: what it is, or what is wrong with it, and what became of it. */
export function ImportRow({ entry, onLeaveOut }: Props) {
  const { name, judged, madeId, problem } = entry;
  return (
    <li className="import-row">
      <div className="import-name">
        <span className="num">{name}</span>
        {madeId === null && (
          <button className="lnk" aria-label={`Leave out ${name}`} onClick={onLeaveOut} disabled={!onLeaveOut}>
            Leave out
          </button>
        )}
      </div>
      {madeId === null ? <Verdict judged={judged} /> : <p>Imported.</p>}
      {problem && (
        <p className="text-stop" role="alert">
          Not imported. {problem}
        </p>
      )}
    </li>
  );
}

function Verdict({ judged }: Pick<ImportEntry, 'judged'>) {
  const { workspaceId } = useWorkspace();
  switch (judged?.is) {
    case undefined:
      return <p className="text-ink3">Reading</p>;
    case 'study':
      return (
        <p>
          A {judged.kind}: “{judged.title}”
        </p>
      );
    case 'library':
      return (
        <p>
          A library file, with {judged.parts} {judged.parts === 1 ? 'part' : 'parts'}. It belongs in the{' '}
          <Link to={`/w/${workspaceId}/library`}>library</Link>: import it there.
        </p>
      );
    case 'wrong':
      return (
        <>
          <p className="text-stop">
            Cannot be imported:{' '}
            {judged.issues.length === 1 ? 'one thing is wrong.' : `${judged.issues.length} things are wrong.`}
          </p>
          <IssueTable issues={judged.issues} />
        </>
      );
  }
}
