import { Notice } from '../../../components/notice.tsx';
import { useDesk } from '../hooks/use-desk.ts';
import { useRun } from '../hooks/run-context.ts';
import { issuesOf } from '../model/derived.ts';
import { labelOfPath } from '../model/issue-text.ts';

/** Above the results: why there is none, or which inputs the curves do not follow. */
export function RunNotices() {
  const { failure, tryAgain, answer } = useRun();
  const issues = useDesk(({ sheet }) => issuesOf(sheet.draft));
  const names = [...new Set(issues.map((issue) => `“${labelOfPath(issue.path)}”`))];
  const kept = answer ? ' The curves below are those of the last study that ran.' : '';
  return (
    <>
      {failure?.kind === 'refused' && (
        <Notice kind="stop">
          {failure.sentences.map((sentence) => (
            <p key={sentence}>{sentence}</p>
          ))}
          {kept && <p>{kept.trim()}</p>}
        </Notice>
      )}
      {failure?.kind === 'crashed' && (
        <Notice
          kind="stop"
          action={
            <button type="button" className="lnk" onClick={tryAgain}>
              Try again
            </button>
          }
        >
          {`The run broke off: ${failure.message}.${kept}`.replace('..', '.')}
        </Notice>
      )}
      <p className="res-status" role="status">
        {names.length > 0 && `The curves keep the last good value of ${names.join(' and ')} until it is mended.`}
      </p>
    </>
  );
}
