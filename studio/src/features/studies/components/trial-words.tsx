import type { SessionStudyInput, StudyIssue } from '@voltiplano/engine';
import { Notice } from '../../../components/notice.tsx';
import { formatQuantity } from '../../../lib/format.ts';
import { issueSentence } from '../../../lib/issue-text.ts';
import { fieldLabel, sectionOfPath } from '../../../lib/study-words.ts';
import { useUnits } from '../../../lib/units.ts';
import { useTrialRun } from '../hooks/use-trial-run.ts';

type Props = { inputs: SessionStudyInput; issues: readonly StudyIssue[] };

/** What the engine says about a session before it is made: what does not fit, or what the run comes to. */
export function TrialWords({ inputs, issues }: Props) {
  const { system } = useUnits();
  if (issues.length === 0) return <RunWords inputs={inputs} />;
  return (
    <Notice kind="stop">
      These parts do not fit together.
      <ul>
        {issues.map((issue) => (
          <li key={`${issue.path} ${issue.rule} ${issue.message}`}>
            {placeOf(issue.path)}
            {issueSentence(issue, undefined, system.temperature)}
          </li>
        ))}
      </ul>
    </Notice>
  );
}

function placeOf(path: string): string {
  const place = [sectionOfPath(path), path && fieldLabel(path)].filter(Boolean).join(', ');
  return place ? `${place}: ` : '';
}

function RunWords({ inputs }: { inputs: SessionStudyInput }) {
  const { temperature, temperatureUnit } = useUnits();
  const { data, error, isPlaceholderData } = useTrialRun(inputs);
  if (error) return <Notice kind="stop">It can be made, but not run: {error.message}</Notice>;
  if (!data || isPlaceholderData) return <Notice>Running these parts</Notice>;
  const { minutes10To80, hottestCoreC, peakStationPowerKw } = data.result.metrics;
  const time =
    minutes10To80 === null ? '10–80 % is not reached' : `10–80 % in ${formatQuantity('min', minutes10To80)} min`;
  const core = `${formatQuantity('temperature', temperature(hottestCoreC))} ${temperatureUnit}`;
  return (
    <Notice>
      These parts run together: {time}, {formatQuantity('kW', peakStationPowerKw)} kW at most, hottest core {core}.
    </Notice>
  );
}
