import { zodResolver } from '@hookform/resolvers/zod';
import { useForm, useWatch } from 'react-hook-form';
import { roles } from '../../../../../server/src/contract/roles.ts';
import { workspaceEndpoints } from '../../../../../server/src/contract/workspace.ts';
import { FormField } from '../../../components/form/form-field.tsx';
import { Form } from '../../../components/form/form.tsx';
import { roleWords } from '../../../components/role-words.ts';
import { toast } from '../../../components/toasts.tsx';
import { useWorkspace } from '../../../lib/session/use-workspace.ts';
import { useInvite } from '../api/invite.ts';

const initial = { email: '', role: 'engineer' as const };

const sentence = (words: string) => `${words.charAt(0).toUpperCase()}${words.slice(1)}.`;

/** Inviting by mail, for a role. */
export function InviteForm() {
  const { workspaceId } = useWorkspace();
  const invite = useInvite(workspaceId);
  const form = useForm({ resolver: zodResolver(workspaceEndpoints.invite.body), defaultValues: initial });
  const { errors } = form.formState;
  const role = useWatch({ control: form.control, name: 'role' });
  return (
    <div className="mt-[12px]">
      <Form
        form={form}
        label="Invite"
        submit="Invite"
        busy="Inviting"
        isRow
        fieldOfCode={{ ALREADY_MEMBER: 'email', ALREADY_INVITED: 'email' }}
        send={async (body) => {
          await invite.mutateAsync(body);
          toast(`An invitation is on its way to ${body.email}. It is open for a week.`);
          form.reset({ email: '', role: body.role });
        }}
      >
        <FormField label="E-mail" error={errors.email?.message} hint="A link is mailed there, open for a week.">
          <input type="email" autoComplete="off" spellCheck={false} {...form.register('email')} />
        </FormField>
        <FormField label="Role" error={errors.role?.message} hint={sentence(roleWords[role])}>
          <select {...form.register('role')}>
            {roles.map((one) => (
              <option key={one} value={one}>
                {one}
              </option>
            ))}
          </select>
        </FormField>
      </Form>
    </div>
  );
}
