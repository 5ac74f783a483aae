import { zodResolver } from '@hookform/resolvers/zod';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { useNavigate } from 'react-router-dom';
import { libraryEndpoints, type LibraryKind } from '../../../../../server/src/contract/library.ts';
import { Button } from '../../../components/button.tsx';
import { Dialog } from '../../../components/dialog.tsx';
import { FormField } from '../../../components/form/form-field.tsx';
import { Form } from '../../../components/form/form.tsx';
import { Menu, MenuItem } from '../../../components/menu.tsx';
import { useCreateLibraryItem } from '../api/create-library-item.ts';
import { kindOrder, kindWords } from '../model/kinds.ts';
import { startingPart } from '../model/starting-part.ts';

/** A menu of kinds; the chosen one is named, and begins from a part of the demo world. */
export function NewPart({ workspaceId }: { workspaceId: string }) {
  const [kind, setKind] = useState<LibraryKind | null>(null);
  return (
    <>
      <Menu trigger={<Button go>New</Button>} align="end">
        {kindOrder.map((one) => (
          <MenuItem key={one} onSelect={() => setKind(one)}>
            {kindWords[one].one}
          </MenuItem>
        ))}
      </Menu>
      {kind && <NewPartDialog kind={kind} workspaceId={workspaceId} onClose={() => setKind(null)} />}
    </>
  );
}

const schema = libraryEndpoints.createLibraryItem.body.pick({ name: true });

type DialogProps = { kind: LibraryKind; workspaceId: string; onClose: () => void };

function NewPartDialog({ kind, workspaceId, onClose }: DialogProps) {
  const create = useCreateLibraryItem(workspaceId);
  const navigate = useNavigate();
  const [idempotencyKey] = useState(() => crypto.randomUUID());
  const form = useForm({ resolver: zodResolver(schema), defaultValues: { name: '' } });
  const add = async ({ name }: { name: string }) => {
    const body = { kind, name, body: await startingPart(kind) };
    const item = await create.mutateAsync({ body, idempotencyKey });
    await navigate(item.id);
  };
  return (
    <Dialog
      title={`New ${kindWords[kind].one.toLowerCase()}`}
      about="It begins with invented values, as revision 1. Put yours in their place."
      open
      onOpenChange={(open) => !open && onClose()}
    >
      <Form form={form} send={add} submit="Add" busy="Adding">
        <FormField label="Name" error={form.formState.errors.name?.message}>
          <input autoComplete="off" maxLength={200} {...form.register('name')} />
        </FormField>
      </Form>
    </Dialog>
  );
}
