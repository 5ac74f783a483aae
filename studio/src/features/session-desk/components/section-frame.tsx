import type { ReactNode } from 'react';
import { Section } from '../../../components/section.tsx';
import { useDesk, useDispatch } from '../hooks/use-desk.ts';
import { changesOf, issuesOf } from '../model/derived.ts';
import { partOfSection } from '../model/library-parts.ts';
import { sections, sectionSummary, type SectionName } from '../model/input-sections.ts';
import { isWithin } from '../../../lib/study-path.ts';
import { PartOrigin } from './part-origin.tsx';

type Props = { name: SectionName; children: ReactNode };

/** One part of the inputs with its place in the chain; shut, it says what it holds and whether something needs mending. */
export function SectionFrame({ name, children }: Props) {
  const { title, side, covers } = sections[name];
  const part = partOfSection[name];
  const dispatch = useDispatch();
  const shut = useDesk((state) => state.view.shut);
  const summary = useDesk((state) => sectionSummary(name, state.sheet.draft.study));
  const concerns = (path: string) => covers.some((ancestor) => isWithin(path, ancestor) || isWithin(ancestor, path));
  const wrong = useDesk(({ sheet }) => issuesOf(sheet.draft).filter((issue) => concerns(issue.path)).length);
  const changed = useDesk(({ sheet }) => changesOf(sheet).filter(concerns).length);
  const toggle = (open: boolean) => {
    const others = shut.filter((one) => one !== name);
    if (open === shut.includes(name)) dispatch({ type: 'view', view: { shut: open ? others : [...others, name] } });
  };
  const open = !shut.includes(name);
  return (
    <div className={`link ${side ?? 'loose'}`} role="group" aria-label={title}>
      <Section
        title={title}
        open={open}
        onToggle={toggle}
        summary={
          <>
            {wrong > 0 && <b className="text-stop">{wrong === 1 ? 'one needs mending' : `${wrong} need mending`}</b>}
            {wrong === 0 && !open && changed > 0 && <b className="text-clay">{`${changed} changed, `}</b>}
            {wrong === 0 && summary}
          </>
        }
      >
        {part && <PartOrigin part={part} />}
        {children}
      </Section>
    </div>
  );
}
