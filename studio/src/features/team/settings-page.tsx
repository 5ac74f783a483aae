import { zodResolver } from '@hookform/resolvers/zod';
import { useForm } from 'react-hook-form';
import { Link } from 'react-router-dom';
import { workspaceEndpoints } from '../../../../server/src/contract/workspace.ts';
import { FormField } from '../../components/form/form-field.tsx';
import { Form } from '../../components/form/form.tsx';
import { Notice } from '../../components/notice.tsx';
import { PageTitle } from '../../components/page-title.tsx';
import { toast } from '../../components/toasts.tsx';
import { useWorkspace } from '../../lib/session/use-workspace.ts';
import { useRenameWorkspace } from './api/rename-workspace.ts';
import { DeleteWorkspace } from './components/delete-workspace.tsx';

/** Name and end of a workspace; for owners. */
export function SettingsPage() {
  const { workspaceName, may } = useWorkspace();
  return (
    <div className="page">
      <PageTitle page={`Settings of ${workspaceName}`}>Workspace settings</PageTitle>
      {may('manage') ? (
        <>
          <RenamePart />
          <section className="page-part" aria-labelledby="part-delete">
            <h2 id="part-delete">Delete</h2>
            <p className="my-[8px] max-w-[70ch] text-ink2">
              Every study, part of the library, revision and log of {workspaceName} is deleted for good, for everybody
              in it. A backup of the server is then the only way back.
            </p>
            <DeleteWorkspace />
          </section>
        </>
      ) : (
        <div className="mt-[16px]">
          <Notice action={<Link to="../team">Who is owner</Link>}>Only owners change these settings.</Notice>
        </div>
      )}
    </div>
  );
}

function RenamePart() {
  const { workspaceId, workspaceName } = useWorkspace();
  const rename = useRenameWorkspace(workspaceId);
  const form = useForm({
    resolver: zodResolver(workspaceEndpoints.renameWorkspace.body),
    defaultValues: { name: workspaceName },
  });
  return (
    <section className="page-part" aria-labelledby="part-rename">
      <h2 id="part-rename" className="mb-[12px]">
        Name
      </h2>
      <Form
        form={form}
        label="Name"
        submit="Rename"
        busy="Renaming"
        go={false}
        send={async (body) => {
          const { name } = await rename.mutateAsync(body);
          form.reset({ name });
          toast(`The workspace is called ${name}.`);
        }}
      >
        <FormField label="Name of the workspace" error={form.formState.errors.name?.message}>
          <input autoComplete="off" {...form.register('name')} />
        </FormField>
      </Form>
    </section>
  );
}
