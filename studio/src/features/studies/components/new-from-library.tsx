import { zodResolver } from '@hookform/resolvers/zod';
import { useQuery } from '@tanstack/react-query';
import { useForm, useWatch } from 'react-hook-form';
import { Link } from 'react-router-dom';
import { z } from 'zod';
import type { LibraryItem } from '../../../../../server/src/contract/library.ts';
import { AsyncView } from '../../../components/async-view.tsx';
import { FormField } from '../../../components/form/form-field.tsx';
import { Form } from '../../../components/form/form.tsx';
import { examples } from '../../../lib/examples.ts';
import { useWorkspace } from '../../../lib/session/use-workspace.ts';
import { useParts } from '../api/list-parts.ts';
import type { MakeStudy } from '../hooks/use-make-study.ts';
import { issuesOf } from '../model/judge-file.ts';
import { nothingChosen, partLabels, putTogether, sessionParts } from '../model/put-together.ts';
import { titleSchema } from '../model/title-schema.ts';
import { TrialWords } from './trial-words.tsx';

type Props = { onMake: MakeStudy };

/** Parts of the library put together to a session. */
export function NewFromLibrary({ onMake }: Props) {
  const { workspaceId } = useWorkspace();
  const parts = useParts(workspaceId);
  return (
    <AsyncView
      query={parts}
      loading="Reading the library"
      isEmpty={(items) => items.length === 0}
      empty={
        <p className="studies-empty">
          Nothing in the <Link to={`/w/${workspaceId}/library`}>library</Link> yet. Add a pack or a station there, or
          start from an example.
        </p>
      }
    >
      {(library) => <PartsForm library={library} onMake={onMake} />}
    </AsyncView>
  );
}

const schema = z.object({
  example: z.string(),
  title: titleSchema,
  chosen: z.object({
    pack: z.string(),
    cell: z.string(),
    thermal: z.string(),
    inlet: z.string(),
    station: z.string(),
    strategy: z.string(),
  }),
});

function PartsForm({ library, onMake }: Props & { library: readonly LibraryItem[] }) {
  const form = useForm({
    resolver: zodResolver(schema),
    defaultValues: { example: examples[0]!.title, title: '', chosen: nothingChosen },
  });
  const [example, title, chosen] = useWatch({ control: form.control, name: ['example', 'title', 'chosen'] });
  const base = useQuery({
    queryKey: ['example', example],
    queryFn: () => examples.find((one) => one.title === example)!.load(),
    staleTime: Infinity,
  });
  const made = base.data ? putTogether(base.data, library, chosen, title) : null;
  const issues = made ? issuesOf(made.inputs) : [];
  return (
    <Form
      form={form}
      label="From the library"
      submit="Make the study"
      busy="Making the study"
      send={async () => {
        if (!made) throw new Error('The example is not here yet. Try again in a moment.');
        if (issues.length > 0) throw new Error('These parts do not fit together yet: see above.');
        await onMake({ ...made, message: 'Put together from the library' });
      }}
    >
      <FormField label="What is not chosen comes from" hint="Its session, and every part not chosen below.">
        <select {...form.register('example')}>
          {examples.map(({ title }) => (
            <option key={title}>{title}</option>
          ))}
        </select>
      </FormField>
      <div className="parts-grid">
        {sessionParts.map((part) => (
          <FormField key={part} label={partLabels[part]}>
            <select {...form.register(`chosen.${part}`)}>
              <option value="">as in the example</option>
              {library
                .filter(({ kind }) => kind === part)
                .map(({ id, name, revision }) => (
                  <option key={id} value={id}>
                    {`${name}, revision ${revision}`}
                  </option>
                ))}
            </select>
          </FormField>
        ))}
      </div>
      <FormField
        label="Title"
        hint="Left empty, the names of pack and station."
        error={form.formState.errors.title?.message}
      >
        <input autoComplete="off" placeholder={made?.inputs.title} {...form.register('title')} />
      </FormField>
      {made && <TrialWords inputs={made.inputs} issues={issues} />}
    </Form>
  );
}
