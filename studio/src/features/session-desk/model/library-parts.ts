import { partSchemas, type SessionStudyInput } from '@voltiplano/engine';
import type { PartReference } from '../../../../../server/src/contract/study.ts';
import { studyIssues } from './checked-study.ts';
import type { SectionName } from './input-sections.ts';
import { remembered } from './remembered.ts';
import { steadyText } from './working-content.ts';

/** Parts of a session that the library holds. */
export type DeskPart = 'station' | 'inlet' | 'pack' | 'strategy' | 'cell' | 'thermal';

/** The section that says where a part came from. */
export const partOfSection: Partial<Record<SectionName, DeskPart>> = {
  station: 'station',
  inlet: 'inlet',
  pack: 'pack',
  taper: 'strategy',
  cell: 'cell',
  cooling: 'thermal',
};

/** What a part is called within a sentence. */
export const partWords: Record<DeskPart, string> = {
  station: 'station',
  inlet: 'inlet',
  pack: 'pack',
  strategy: 'strategy',
  cell: 'cell',
  thermal: 'cooling',
};

export function referenceTo(references: readonly PartReference[], part: DeskPart): PartReference | undefined {
  return references.find((one) => one.part === part);
}

/** References with another for one part. */
export function withReference(references: readonly PartReference[], next: PartReference): PartReference[] {
  return [...references.filter(({ part }) => part !== next.part), next];
}

/** Whether a part of the desk says otherwise than one of the library; defaults count as if they were written. */
export function saysOtherwise(part: DeskPart, own: object | undefined, body: object): boolean {
  return own === undefined || senseOf[part](own) !== senseOf[part](body);
}

/** Why a study cannot be run with another part in place; null where it can. */
export function whyNotTaken(study: SessionStudyInput, part: DeskPart, body: object): string | null {
  return studyIssues({ ...study, [part]: body })[0]?.message ?? null;
}

const senseIn = (part: DeskPart) =>
  remembered((value: object): string => {
    const parsed = partSchemas[part].safeParse(value);
    return steadyText(parsed.success ? parsed.data : value);
  });

const senseOf: Record<DeskPart, (value: object) => string> = {
  station: senseIn('station'),
  inlet: senseIn('inlet'),
  pack: senseIn('pack'),
  strategy: senseIn('strategy'),
  cell: senseIn('cell'),
  thermal: senseIn('thermal'),
};
