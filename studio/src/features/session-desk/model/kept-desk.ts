import type { SessionStudyInput, StudyIssue } from '@voltiplano/engine';
import { deskWith, firstView, type DeskState, type Sheet, type Step } from './desk-state.ts';
import { studyIssues } from './checked-study.ts';

/** Steps of undo that survive a reload; each holds a whole study. */
const STEPS_KEPT_OVER_RELOAD = 40;
const VERSION = 1;

type Kept = Pick<DeskState, 'sheet' | 'past' | 'view'> & { version: number };

export type ReadDesk = { desk: DeskState } | { issues: StudyIssue[] };

/** The desk as text to keep in this browser. */
export function keptDeskText({ sheet, past, view }: DeskState): string {
  const kept: Kept = { version: VERSION, sheet, past: past.slice(-STEPS_KEPT_OVER_RELOAD), view };
  return JSON.stringify(kept);
}

/** Reads back a kept desk; where its study can no longer be run, why. */
export function readKeptDesk(text: string): ReadDesk {
  const kept = parsed(text);
  if (!isKept(kept)) return { issues: [{ path: '', rule: 'kept', message: 'What this browser kept is no desk' }] };
  const issues = sheetIssues(kept.sheet);
  if (issues.length > 0) return { issues };
  const past = kept.past
    .filter((step) => sheetIssues(step.sheet).length === 0)
    .map((step) => ({ ...step, sheet: completed(step.sheet) }));
  return {
    desk: { ...deskWith(completed(kept.sheet)), past, view: { ...firstView, ...kept.view } },
  };
}

function parsed(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return undefined;
  }
}

function isKept(value: unknown): value is Kept {
  const kept = value as Partial<Kept> | undefined;
  return kept?.version === VERSION && isSheet(kept.sheet) && Array.isArray(kept.past) && kept.past.every(isStep);
}

function isStep(value: unknown): value is Step {
  const step = value as Partial<Step> | null;
  return typeof step?.label === 'string' && isSheet(step.sheet);
}

/** Sheets kept before they knew where their parts came from. */
function completed(sheet: Sheet): Sheet {
  return { ...sheet, references: sheet.references ?? [] };
}

function isSheet(value: unknown): value is Sheet {
  const sheet = value as Partial<Sheet> | null | undefined;
  return typeof sheet?.draft?.pending === 'object' && sheet.draft.pending !== null && 'baseline' in sheet;
}

function sheetIssues({ draft, baseline }: Sheet): StudyIssue[] {
  const of = (study: SessionStudyInput | null) => (study === null ? [] : studyIssues(study));
  return [...of(draft.study), ...of(baseline)];
}
