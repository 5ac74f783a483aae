import { zodResolver } from '@hookform/resolvers/zod';
import { useQuery, useQueryClient } from '@tanstack/react-query';
import { useForm } from 'react-hook-form';
import { AsyncView } from '../../../components/async-view.tsx';
import { Dialog } from '../../../components/dialog.tsx';
import { DifferenceList } from '../../../components/difference-list.tsx';
import { Form } from '../../../components/form/form.tsx';
import { FormField } from '../../../components/form/form-field.tsx';
import { Notice } from '../../../components/notice.tsx';
import { toast } from '../../../components/toasts.tsx';
import { isProblem } from '../../../lib/api/api-problem.ts';
import { labelOfPath } from '../../../lib/issue-text.ts';
import { studyDifferences } from '../../../lib/study-differences.ts';
import { useUnits } from '../../../lib/units.ts';
import { revisionQuery, revisionsQuery } from '../api/revision-queries.ts';
import { revisionMessage, saveRevision } from '../api/save-revision.ts';
import { studyActivityQuery } from '../api/study-activity-query.ts';
import { setStudy, studyQuery } from '../api/study-query.ts';
import { useStudyDesk } from '../hooks/study-desk-context.ts';
import { useStudy } from '../hooks/use-study.ts';
import { useWishKey } from '../hooks/use-wish-key.ts';
import type { DeskStore } from '../model/desk-store.ts';

type Props = { store: DeskStore; open: boolean; onOpenChange: (open: boolean) => void };

/** Makes a revision of what is on the desk: what changed, and a message that says why. */
export function SaveRevisionDialog({ store, open, onOpenChange }: Props) {
  const { revision } = useStudy();
  return (
    <Dialog title={`Save revision ${revision + 1}`} open={open} onOpenChange={onOpenChange}>
      <SaveRevision store={store} onSaved={() => onOpenChange(false)} />
    </Dialog>
  );
}

function SaveRevision({ store, onSaved }: { store: DeskStore; onSaved: () => void }) {
  const pending = Object.keys(store.get().sheet.draft.pending);
  return (
    <div className="flex flex-col gap-[16px]">
      <Changes store={store} />
      {pending.length > 0 ? (
        <Notice kind="stop">
          {`Cannot save a revision: ${waitingWords(pending)} a rule. Mend or undo it first; until then it is kept as it was typed.`}
        </Notice>
      ) : (
        <MessageForm onSaved={onSaved} />
      )}
    </div>
  );
}

function waitingWords(paths: readonly string[]): string {
  const names = paths.map((path) => `“${labelOfPath(path)}”`);
  return `${names.join(' and ')} ${names.length === 1 ? 'breaks' : 'break'}`;
}

function Changes({ store }: { store: DeskStore }) {
  const { place } = useStudyDesk();
  const { revision } = useStudy();
  const { temperatureUnit } = useUnits();
  const query = useQuery(revisionQuery(place, revision));
  return (
    <AsyncView query={query} loading="Comparing with the newest revision.">
      {({ inputs }) => {
        const differences = studyDifferences(inputs, store.get().sheet.draft.study, temperatureUnit);
        return differences.length === 0 ? (
          <p className="text-label text-ink2">{`No input is other than in revision ${revision}.`}</p>
        ) : (
          <div className="long-list">
            <DifferenceList
              differences={differences}
              before={`Revision ${revision}`}
              after="now"
              caption={`What changed since revision ${revision}`}
            />
          </div>
        );
      }}
    </AsyncView>
  );
}

function MessageForm({ onSaved }: { onSaved: () => void }) {
  const form = useForm({ resolver: zodResolver(revisionMessage), defaultValues: { message: '' } });
  const save = useSaveRevision();
  return (
    <Form
      form={form}
      submit="Save revision"
      busy="Saving"
      send={async ({ message }) => {
        const { revision } = await save(message);
        toast(`Revision ${revision} saved`);
        onSaved();
      }}
    >
      <FormField
        label="What this revision is"
        hint="Read by others in the history: what changed, and why."
        error={form.formState.errors.message?.message}
      >
        <textarea rows={2} {...form.register('message')} />
      </FormField>
    </Form>
  );
}

/** Saves once everything typed has reached the server; a wish sent twice makes one revision. */
function useSaveRevision() {
  const { place, saver } = useStudyDesk();
  const client = useQueryClient();
  const keyOf = useWishKey();
  return async (message: string) => {
    try {
      const study = await saver.alone((version) =>
        saveRevision(place, message, version, keyOf(`${version} ${message}`)),
      );
      await setStudy(client, place, study);
      await client.invalidateQueries({ queryKey: revisionsQuery(place).queryKey });
      void client.invalidateQueries({ queryKey: studyActivityQuery(place).queryKey });
      return study;
    } catch (error) {
      if (!isProblem(error, 'EDIT_CONFLICT')) throw error;
      await client.invalidateQueries({ queryKey: studyQuery(place).queryKey });
      throw new Error('Somebody changed the study meanwhile. Look at what came, then save again.', { cause: error });
    }
  };
}
