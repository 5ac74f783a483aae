import '../../lib/zod-without-eval.ts';
import './studies.css';
import { Link, Navigate, useSearchParams } from 'react-router-dom';
import { PageTitle } from '../../components/page-title.tsx';
import { WordSwitch } from '../../components/word-switch.tsx';
import { useWorkspace } from '../../lib/session/use-workspace.ts';
import { ImportFiles } from './components/import-files.tsx';
import { NewFromExample } from './components/new-from-example.tsx';
import { NewFromLibrary } from './components/new-from-library.tsx';
import { useMakeStudy } from './hooks/use-make-study.ts';
import { useOpenImported } from './hooks/use-open-imported.ts';

const ways = [
  { value: 'example', label: 'an example' },
  { value: 'library', label: 'parts of the library' },
  { value: 'file', label: 'a study file' },
] as const;
type Way = (typeof ways)[number]['value'];

/** Three ways to a new study; which of them stands in the address. */
export function NewStudyPage() {
  const { workspaceId, may } = useWorkspace();
  const [params, setParams] = useSearchParams();
  const way: Way = ways.find(({ value }) => value === params.get('from'))?.value ?? 'example';
  const make = useMakeStudy();
  const openImported = useOpenImported();
  const list = `/w/${workspaceId}/studies`;
  if (!may('edit-studies')) return <Navigate to={list} replace />;
  return (
    <div className="page studies-new">
      <div className="page-head">
        <div>
          <PageTitle page="New study">New study</PageTitle>
          <p className="count">
            <Link to={list}>Studies</Link>
          </p>
        </div>
      </div>
      <div className="studies-filters">
        <div className="group">
          <span className="caption" aria-hidden="true">
            Start from
          </span>
          <WordSwitch
            label="Start from"
            value={way}
            options={ways}
            onChange={(from) => setParams({ from }, { replace: true })}
          />
        </div>
      </div>
      {way === 'example' && <NewFromExample onMake={make} />}
      {way === 'library' && <NewFromLibrary onMake={make} />}
      {way === 'file' && <ImportFiles onMade={openImported} />}
    </div>
  );
}
