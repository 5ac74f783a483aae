import { zodResolver } from '@hookform/resolvers/zod';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { libraryEndpoints, type LibraryItem } from '../../../../../server/src/contract/library.ts';
import { Button } from '../../../components/button.tsx';
import { DifferenceList } from '../../../components/difference-list.tsx';
import { Dialog } from '../../../components/dialog.tsx';
import { FormField } from '../../../components/form/form-field.tsx';
import { Form } from '../../../components/form/form.tsx';
import { toast } from '../../../components/toasts.tsx';
import { isProblem } from '../../../lib/api/api-problem.ts';
import { useUnits } from '../../../lib/units.ts';
import { useReviseLibraryItem } from '../api/revise-library-item.ts';
import type { ItemDesk } from '../hooks/use-item-draft.ts';
import { contentOf, itemDifferences } from '../model/item-content.ts';

type Props = {
  workspaceId: string;
  item: LibraryItem;
  desk: ItemDesk;
  /** Has the newest revision asked for, after somebody else turned out to have saved one. */
  onConflict: () => Promise<unknown>;
};

/** The act that makes a revision of what was changed. */
export function SaveRevision(props: Props) {
  const { desk } = props;
  const [isOpen, setOpen] = useState(false);
  const reason = whyNot(desk);
  return (
    <>
      <Button go unavailable={reason} onClick={() => setOpen(true)}>
        Save revision
      </Button>
      {isOpen && <SaveDialog {...props} onClose={() => setOpen(false)} />}
    </>
  );
}

function whyNot({ isChanged, draft, theirs }: ItemDesk): string | undefined {
  if (!isChanged) return 'Nothing is changed';
  if (theirs) return 'Choose below first';
  if (Object.keys(draft.pending).length > 0) return 'Mend what waits first';
  return draft.name.trim() === '' ? 'A name is needed' : undefined;
}

const schema = libraryEndpoints.reviseLibraryItem.body.pick({ message: true });

function SaveDialog({ workspaceId, item, desk, onConflict, onClose }: Props & { onClose: () => void }) {
  const revise = useReviseLibraryItem(workspaceId, item.id);
  const { temperatureUnit } = useUnits();
  const [idempotencyKey] = useState(() => crypto.randomUUID());
  const form = useForm({ resolver: zodResolver(schema), defaultValues: { message: '' } });
  const { base, draft } = desk;
  const save = async ({ message }: { message: string }) => {
    try {
      const body = { ...contentOf(draft), message };
      const next = await revise.mutateAsync({ body, madeFrom: base.revision, idempotencyKey });
      desk.saved(next, draft);
      toast(`Revision ${next.revision} saved.`);
      onClose();
    } catch (error) {
      if (!isProblem(error, 'EDIT_CONFLICT')) throw error;
      await onConflict();
      onClose();
    }
  };
  return (
    <Dialog
      title={`Save revision ${base.revision + 1}`}
      about={studyWords(item.studyCount)}
      open
      onOpenChange={(open) => !open && onClose()}
    >
      <Form form={form} send={save} submit="Save" busy="Saving">
        <FormField
          label="What changed"
          hint="In a few words; may be left empty"
          error={form.formState.errors.message?.message}
        >
          <input autoComplete="off" maxLength={300} {...form.register('message')} />
        </FormField>
      </Form>
      <div className="item-differences">
        <DifferenceList
          differences={itemDifferences(item.kind, base, draft, temperatureUnit)}
          before={`Revision ${base.revision}`}
          after="Now"
          caption="What is changed"
        />
      </div>
    </Dialog>
  );
}

/** What a new revision means for who relies on the part. */
function studyWords(studyCount: number): string {
  if (studyCount === 0) return 'No study uses this part yet.';
  const one = studyCount === 1;
  return `${one ? 'One study holds' : `${studyCount} studies hold`} this part. ${one ? 'It keeps' : 'They keep'} what ${one ? 'it has' : 'they have'}, and ${one ? 'is' : 'are'} told of the newer revision.`;
}
