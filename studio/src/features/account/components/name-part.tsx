import { zodResolver } from '@hookform/resolvers/zod';
import { useForm } from 'react-hook-form';
import { accountEndpoints, type Person } from '../../../../../server/src/contract/account.ts';
import { FormField } from '../../../components/form/form-field.tsx';
import { Form } from '../../../components/form/form.tsx';
import { toast } from '../../../components/toasts.tsx';
import { useRenameMe } from '../api/rename-me.ts';

export function NamePart({ person }: { person: Person }) {
  const rename = useRenameMe();
  const form = useForm({ resolver: zodResolver(accountEndpoints.renameMe.body), defaultValues: { name: person.name } });
  return (
    <section className="page-part" aria-labelledby="part-name">
      <h2 id="part-name">Name</h2>
      <Form
        form={form}
        label="Name"
        submit="Change the name"
        busy="Changing the name"
        go={false}
        send={async (body) => {
          const { name } = await rename.mutateAsync(body);
          form.reset({ name });
          toast(`Your name is ${name}.`);
        }}
      >
        <FormField label="Your name" error={form.formState.errors.name?.message} hint="As others read it.">
          <input autoComplete="name" {...form.register('name')} />
        </FormField>
      </Form>
    </section>
  );
}
