import type { ReactNode } from 'react';
import type { LibraryItem } from '../../../../../server/src/contract/library.ts';
import { TitleBlock } from '../../../components/title-block.tsx';
import { TitleInput } from '../../../components/title-input.tsx';
import { kindWords } from '../model/kinds.ts';
import { WhoWhen } from './who-when.tsx';

type Props = {
  item: LibraryItem;
  name: string;
  isChanged: boolean;
  isKept: boolean;
  readOnly: boolean;
  onName: (name: string) => void;
  actions: ReactNode;
};

/** What the part is called, how far it has come, and who relies on it. */
export function ItemTitleBlock({ item, name, isChanged, isKept, readOnly, onName, actions }: Props) {
  const { kind, revision, changedBy, changedAt, studyCount, archivedAt } = item;
  const cells = [
    { label: 'Revision', value: archivedAt ? `${revision}, in the archive` : String(revision) },
    { label: 'Changed', value: <WhoWhen by={changedBy} at={changedAt} /> },
    { label: 'In studies', value: String(studyCount) },
    ...(readOnly ? [] : [{ label: 'Your changes', value: <ChangeWords isChanged={isChanged} isKept={isKept} /> }]),
  ];
  return (
    <TitleBlock
      kind={kindWords[kind].one}
      title={<NameField name={name} readOnly={readOnly} onName={onName} />}
      cells={cells}
      actions={actions}
    />
  );
}

function ChangeWords({ isChanged, isKept }: { isChanged: boolean; isKept: boolean }) {
  const words = isKept ? 'kept in this browser' : 'not kept: this browser refuses';
  return <span role="status">{isChanged ? words : 'none'}</span>;
}

function NameField({ name, readOnly, onName }: { name: string; readOnly: boolean; onName: (name: string) => void }) {
  if (readOnly) return <h1>{name}</h1>;
  return (
    <>
      <h1 className="unseen">{name || 'Without a name'}</h1>
      <TitleInput
        label="Name of the part"
        value={name}
        placeholder="Without a name"
        maxLength={200}
        isWrong={name.trim() === ''}
        onText={onName}
      />
    </>
  );
}
