import { useForm } from 'react-hook-form';
import { Button } from '../../../components/button.tsx';
import { Dialog } from '../../../components/dialog.tsx';
import { FormField } from '../../../components/form/form-field.tsx';
import { Form } from '../../../components/form/form.tsx';
import { useWorkspace } from '../../../lib/session/use-workspace.ts';
import { useDeleteWorkspace } from '../api/delete-workspace.ts';

/** Deleting, which asks for the name, so that nobody deletes another workspace than they mean. */
export function DeleteWorkspace() {
  const { workspaceId, workspaceName } = useWorkspace();
  const remove = useDeleteWorkspace(workspaceId);
  const form = useForm({ defaultValues: { name: '' } });
  const { errors } = form.formState;
  return (
    <Dialog
      title={`Delete ${workspaceName}`}
      about="This cannot be undone. Type the name of the workspace to go on."
      trigger={<Button>Delete the workspace</Button>}
    >
      <Form
        form={form}
        label="Delete the workspace"
        submit="Delete for good"
        busy="Deleting"
        send={async (body) => {
          await remove.mutateAsync(body);
          // Loaded anew, so that nothing of the workspace stays in the page's memory.
          window.location.assign('/account');
        }}
      >
        <FormField label="Name of the workspace" error={errors.name?.message} hint={workspaceName}>
          <input
            autoComplete="off"
            spellCheck={false}
            {...form.register('name', {
              validate: (name) => name === workspaceName || `Type ${workspaceName}, as it is written`,
            })}
          />
        </FormField>
      </Form>
    </Dialog>
  );
}
