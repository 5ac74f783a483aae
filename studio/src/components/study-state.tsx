import type { StudyState } from '../../../server/src/contract/study-words.ts';
import { stateWords } from '../lib/study-names.ts';

/** The mark as a state: dashed for a draft, in clay for one in review, filled ground for one released. */
function StateMark({ state }: { state: StudyState }) {
  const drawn = {
    draft: { fill: 'none', stroke: 'var(--ink3)', strokeWidth: 1.5, strokeDasharray: '2 1.6' },
    'in-review': { fill: 'none', stroke: 'var(--clay)', strokeWidth: 1.8 },
    released: { fill: 'var(--ink)', stroke: 'var(--ink)', strokeWidth: 1.2 },
  }[state];
  const path = state === 'released' ? 'M1 10L4 3H8V6H13V10Z' : 'M1 9L4 3H8V6H13';
  return (
    <svg width={19} height={15} viewBox="0 0 15 12" className="flex-none" aria-hidden="true">
      <path d={path} {...drawn} />
    </svg>
  );
}

type Props = { state: StudyState; revision: number };

/** How far a study has come, and the number of its newest revision. */
export function StateWithRevision({ state, revision }: Props) {
  return (
    <span className="inline-flex items-center gap-[8px] align-middle whitespace-nowrap">
      <StateMark state={state} />
      {stateWords[state]}
      <span className="num text-ink3">
        <span className="unseen">revision </span>
        {revision}
      </span>
    </span>
  );
}
