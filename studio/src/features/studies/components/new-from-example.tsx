import { zodResolver } from '@hookform/resolvers/zod';
import { useForm, useWatch } from 'react-hook-form';
import { z } from 'zod';
import { FormField } from '../../../components/form/form-field.tsx';
import { Form } from '../../../components/form/form.tsx';
import { examples } from '../../../lib/examples.ts';
import type { MakeStudy } from '../hooks/use-make-study.ts';
import { titled } from '../model/judge-file.ts';
import { titleSchema } from '../model/title-schema.ts';

const schema = z.object({ example: z.string(), title: titleSchema });

/** One of the studio's examples, under its own title or another. */
export function NewFromExample({ onMake }: { onMake: MakeStudy }) {
  const [first] = examples;
  const form = useForm({ resolver: zodResolver(schema), defaultValues: { example: first!.title, title: '' } });
  const chosen = useWatch({ control: form.control, name: 'example' });
  return (
    <Form
      form={form}
      label="From an example"
      submit="Make the study"
      busy="Making the study"
      send={async ({ example, title }) => {
        const found = examples.find((one) => one.title === example)!;
        await onMake({
          inputs: titled(await found.load(), title || found.title),
          message: `From the example “${example}”`,
        });
      }}
    >
      <fieldset className="example-list">
        <legend className="unseen">Example</legend>
        {examples.map(({ title, shows }) => (
          <label key={title}>
            <input type="radio" value={title} {...form.register('example')} />
            <span className="example-title">{title}</span>
            <span className="example-shows">{shows}</span>
          </label>
        ))}
      </fieldset>
      <FormField label="Title" hint="Left empty, the example’s own." error={form.formState.errors.title?.message}>
        <input placeholder={chosen} autoComplete="off" {...form.register('title')} />
      </FormField>
    </Form>
  );
}
