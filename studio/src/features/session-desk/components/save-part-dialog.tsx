import { zodResolver } from '@hookform/resolvers/zod';
import { useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import type { LibraryItem } from '../../../../../server/src/contract/library.ts';
import { Dialog } from '../../../components/dialog.tsx';
import { Form } from '../../../components/form/form.tsx';
import { FormField } from '../../../components/form/form-field.tsx';
import { toast } from '../../../components/toasts.tsx';
import { WordSwitch } from '../../../components/word-switch.tsx';
import { libraryKey } from '../../../lib/api/library-key.ts';
import { createLibraryItem, newItemSchema, newRevisionSchema, reviseLibraryItem } from '../api/save-library-item.ts';
import { useStudyDesk } from '../hooks/study-desk-context.ts';
import { useDeskStore } from '../hooks/use-desk.ts';
import type { PartOrigin } from '../hooks/use-part-origin.ts';
import { useWishKey } from '../hooks/use-wish-key.ts';
import { partWords, withReference, type DeskPart } from '../model/library-parts.ts';

type Props = { part: DeskPart; origin: PartOrigin | null; onOpenChange: (open: boolean) => void };

/** Puts a section of the desk into the library: as a new revision of what it was taken from, or as a part of its own. */
export function SavePartDialog({ part, origin, onOpenChange }: Props) {
  // Over a newer revision nothing is written: it is taken or left first, and this one can be added beside it.
  const mayRevise = origin?.taken && origin.newest === origin.reference.revision && !origin.isArchived ? origin : null;
  const [way, setWay] = useState<'revise' | 'add'>(mayRevise ? 'revise' : 'add');
  const onSaved = useSaved(part, () => onOpenChange(false));
  return (
    <Dialog title={`Save to the library: ${partWords[part]}`} open onOpenChange={onOpenChange}>
      <div className="flex flex-col gap-[16px]">
        {mayRevise && (
          <WordSwitch
            label="How it is saved"
            value={way}
            options={[
              { value: 'revise' as const, label: `revision ${mayRevise.newest + 1} of ${mayRevise.name}` },
              { value: 'add' as const, label: 'a part of its own' },
            ]}
            onChange={setWay}
          />
        )}
        {mayRevise && way === 'revise' ? (
          <ReviseForm part={part} origin={mayRevise} onSaved={onSaved} />
        ) : (
          <AddForm part={part} onSaved={onSaved} />
        )}
      </div>
    </Dialog>
  );
}

type FormProps = { part: DeskPart; onSaved: (item: LibraryItem) => void };

function ReviseForm({ part, origin, onSaved }: FormProps & { origin: PartOrigin }) {
  const { place } = useStudyDesk();
  const store = useDeskStore();
  const keyOf = useWishKey();
  const form = useForm({ resolver: zodResolver(newRevisionSchema), defaultValues: { message: '' } });
  return (
    <Form
      form={form}
      submit="Save the revision"
      busy="Saving"
      send={async ({ message }) => {
        const { itemId } = origin.reference;
        const revising = { itemId, from: origin.taken!, body: bodyOf(store.get().sheet.draft.study[part]), message };
        onSaved(await reviseLibraryItem(place.workspaceId, revising, keyOf(message)));
      }}
    >
      <FormField label="What changed" error={form.formState.errors.message?.message}>
        <textarea rows={2} {...form.register('message')} />
      </FormField>
    </Form>
  );
}

function AddForm({ part, onSaved }: FormProps) {
  const { place } = useStudyDesk();
  const store = useDeskStore();
  const keyOf = useWishKey();
  const own = store.get().sheet.draft.study[part] as { name?: string } | undefined;
  const form = useForm({
    resolver: zodResolver(newItemSchema),
    defaultValues: { name: own?.name ?? '', source: '', message: 'Added' },
  });
  const { errors } = form.formState;
  return (
    <Form
      form={form}
      submit="Add to the library"
      busy="Adding"
      send={async (said) => {
        const item = { kind: part, ...said, body: bodyOf(store.get().sheet.draft.study[part]) };
        onSaved(await createLibraryItem(place.workspaceId, item, keyOf(JSON.stringify(said))));
      }}
    >
      <FormField label="Name" error={errors.name?.message}>
        <input autoComplete="off" {...form.register('name')} />
      </FormField>
      <FormField label="Source" hint="Where the values come from." error={errors.source?.message}>
        <input autoComplete="off" {...form.register('source')} />
      </FormField>
    </Form>
  );
}

/** The desk's part came from what was saved from now on; its name, where it has one, is the item's. */
function useSaved(part: DeskPart, onDone: () => void) {
  const { place } = useStudyDesk();
  const store = useDeskStore();
  const client = useQueryClient();
  return ({ id, name, revision, body }: LibraryItem) => {
    const { references } = store.get().sheet;
    const next = withReference(references, { part, itemId: id, revision, keptAgainst: null });
    const label = `save ${name}, revision ${revision}, to the library`;
    store.dispatch({ type: 'refer', references: next, parts: [{ path: part, value: body }], label });
    toast(`In the library: ${name}, revision ${revision}`);
    void client.invalidateQueries({ queryKey: libraryKey(place.workspaceId) });
    onDone();
  };
}

function bodyOf(part: object | undefined): Record<string, unknown> {
  return { ...part };
}
