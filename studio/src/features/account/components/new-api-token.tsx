import { zodResolver } from '@hookform/resolvers/zod';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import type { Membership } from '../../../../../server/src/contract/account.ts';
import { apiTokenEndpoints } from '../../../../../server/src/contract/api-token.ts';
import { lesserRole, roles } from '../../../../../server/src/contract/roles.ts';
import { FormField } from '../../../components/form/form-field.tsx';
import { Form } from '../../../components/form/form.tsx';
import { useCreateApiToken } from '../api/create-api-token.ts';
import { TokenOnce } from './token-once.tsx';

const initial = { name: '', role: 'viewer' as const, days: 90 };

/** Making a token, for a role not above the own one. */
export function NewApiToken({ workspace: { workspaceId, workspaceName, role } }: { workspace: Membership }) {
  const create = useCreateApiToken(workspaceId);
  const [made, setMade] = useState<{ name: string; token: string } | null>(null);
  const form = useForm({ resolver: zodResolver(apiTokenEndpoints.createApiToken.body), defaultValues: initial });
  const { errors } = form.formState;
  const allowed = roles.filter((one) => lesserRole(one, role) === one);
  return (
    <div className="mt-[20px]">
      {made && <TokenOnce name={made.name} token={made.token} onPutAway={() => setMade(null)} />}
      <h3 className="mb-[8px]">New token for {workspaceName}</h3>
      <Form
        form={form}
        label="New API token"
        submit="Make a token"
        busy="Making the token"
        isRow
        go={false}
        fieldOfCode={{ FORBIDDEN: 'role' }}
        send={async (body) => {
          const { token, apiToken } = await create.mutateAsync(body);
          create.reset();
          setMade({ name: apiToken.name, token });
          form.reset(initial);
        }}
      >
        <FormField label="What it is for" error={errors.name?.message}>
          <input autoComplete="off" {...form.register('name')} />
        </FormField>
        <FormField label="Role" error={errors.role?.message} hint="It never does more than you may yourself.">
          <select {...form.register('role')}>
            {allowed.map((one) => (
              <option key={one} value={one}>
                {one}
              </option>
            ))}
          </select>
        </FormField>
        <FormField label="Days until it expires" error={errors.days && DAYS_RULE} hint={DAYS_RULE}>
          <input inputMode="numeric" autoComplete="off" {...form.register('days', { valueAsNumber: true })} />
        </FormField>
      </Form>
    </div>
  );
}

const DAYS_RULE = 'A whole number from 1 to 366.';
