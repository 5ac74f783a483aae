import { zodResolver } from '@hookform/resolvers/zod';
import { useForm } from 'react-hook-form';
import { useNavigate } from 'react-router-dom';
import { workspaceEndpoints } from '../../../../server/src/contract/workspace.ts';
import { FormField } from '../../components/form/form-field.tsx';
import { Form } from '../../components/form/form.tsx';
import { PageTitle } from '../../components/page-title.tsx';
import { useCreateWorkspace } from './api/create-workspace.ts';

/** Making a workspace of one's own. */
export function NewWorkspacePage() {
  const create = useCreateWorkspace();
  const navigate = useNavigate();
  const form = useForm({ resolver: zodResolver(workspaceEndpoints.createWorkspace.body), defaultValues: { name: '' } });
  return (
    <section className="page form-page">
      <PageTitle page="New workspace">New workspace</PageTitle>
      <p className="text-ink2">
        Studies and library of a workspace are its own. You become its owner and can invite others.
      </p>
      <Form
        form={form}
        label="New workspace"
        submit="Make the workspace"
        busy="Making the workspace"
        send={async (body) => {
          const { id } = await create.mutateAsync(body);
          await navigate(`/w/${id}`);
        }}
      >
        <FormField label="Name" error={form.formState.errors.name?.message} hint="The name of your team or project.">
          <input autoComplete="organization" {...form.register('name')} />
        </FormField>
      </Form>
    </section>
  );
}
