import type { ReactNode } from 'react';
import { TitleBlock } from '../../../components/title-block.tsx';
import { useDesk, useDeskStore } from '../hooks/use-desk.ts';
import { useKeptDesk } from '../hooks/use-kept-desk.ts';
import { changesOf } from '../model/derived.ts';
import { BaselineCell } from './baseline-cell.tsx';
import { TitleField } from './title-field.tsx';

type Props = { actions: ReactNode };

/** Title, baseline, how much has changed against it, and whether it is kept. */
export function DeskTitleBlock({ actions }: Props) {
  const hasBaseline = useDesk(({ sheet }) => sheet.baseline !== null);
  const changed = useDesk(({ sheet }) => changesOf(sheet).length);
  const cells = [
    { label: 'Baseline', value: <BaselineCell /> },
    { label: 'Changed', value: hasBaseline ? `${changed} ${changed === 1 ? 'input' : 'inputs'}` : 'no baseline' },
    { label: 'Kept', value: <KeptWords /> },
  ];
  return <TitleBlock kind="Session study" title={<TitleField />} cells={cells} actions={actions} />;
}

function KeptWords() {
  return <span role="status">{useKeptDesk(useDeskStore())}</span>;
}
