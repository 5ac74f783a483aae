import { Notice } from '../../../components/notice.tsx';
import { useDesk } from '../hooks/use-desk.ts';
import { useRun, useRuns } from '../hooks/run-context.ts';
import { issuesOf } from '../model/derived.ts';
import { labelOfPath } from '../../../lib/issue-text.ts';

/** Above the results: why the present study has none. */
export function RunFailureNotice() {
  const { tryAgain } = useRuns();
  const failure = useRun((run) => run.failure);
  const hasAnswer = useRun((run) => run.answer !== null);
  if (!failure) return null;
  const kept = hasAnswer ? 'What follows is of the last study that ran.' : '';
  if (failure.kind === 'refused')
    return (
      <Notice kind="stop">
        {[...failure.sentences, kept].filter(Boolean).map((sentence) => (
          <p key={sentence}>{sentence}</p>
        ))}
      </Notice>
    );
  const again = (
    <button type="button" className="lnk" onClick={tryAgain}>
      Try again
    </button>
  );
  return (
    <Notice kind="stop" action={again}>
      {`The run broke off: ${failure.message.replace(/\.$/, '')}. ${kept}`}
    </Notice>
  );
}

/** Which inputs the curves do not follow yet; its line is always there, so that nothing moves. */
export function WaitingInputs() {
  const issues = useDesk(({ sheet }) => issuesOf(sheet.draft));
  const names = [...new Set(issues.map((issue) => `“${labelOfPath(issue.path)}”`))];
  return (
    <p className="res-status" role="status">
      {names.length > 0 && `The curves keep the last good value of ${names.join(' and ')} until it is mended.`}
    </p>
  );
}
