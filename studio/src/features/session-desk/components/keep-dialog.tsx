import { useState } from 'react';
import { Link, useNavigate } from 'react-router-dom';
import type { Me } from '../../../../../server/src/contract/account.ts';
import { roleMay } from '../../../../../server/src/contract/roles.ts';
import { Button } from '../../../components/button.tsx';
import { Dialog } from '../../../components/dialog.tsx';
import { FormField } from '../../../components/form/form-field.tsx';
import { Notice } from '../../../components/notice.tsx';
import { problemSentence } from '../../../lib/api/api-problem.ts';
import { lastWorkspace, workspaceToOpen } from '../../../lib/session/last-workspace.ts';
import { createStudyFromDesk } from '../hooks/create-study-from-desk.ts';
import { useDesk, useDeskStore } from '../hooks/use-desk.ts';
import { useWishKey } from '../hooks/use-wish-key.ts';

type Props = { me: Me; onOpenChange: (open: boolean) => void };

/** Makes a study of a workspace of what is on the guest's desk, and opens it. */
export function KeepDialog({ me, onOpenChange }: Props) {
  const title = useDesk(({ sheet }) => sheet.draft.study.title || 'Untitled session');
  const mine = me.workspaces.filter(({ role }) => roleMay(role, 'edit-studies'));
  return (
    <Dialog
      title="Keep this study"
      about={`“${title}” becomes a study of a workspace, which its members can read.`}
      open
      onOpenChange={onOpenChange}
    >
      {mine.length === 0 ? (
        <p className="text-label">
          {'In none of your workspaces may you make studies. '}
          <Link to="/new-workspace">Make a workspace of your own</Link>
        </p>
      ) : (
        <KeepForm me={{ ...me, workspaces: mine }} />
      )}
    </Dialog>
  );
}

function KeepForm({ me }: { me: Me }) {
  const [workspaceId, setWorkspaceId] = useState(workspaceToOpen(me, lastWorkspace.get())!.workspaceId);
  const { keep, isBusy, problem } = useKeeping(me.person.id);
  return (
    <div className="flex flex-col gap-[16px]">
      <FormField label="Workspace">
        <select value={workspaceId} onChange={(event) => setWorkspaceId(event.target.value)}>
          {me.workspaces.map((one) => (
            <option key={one.workspaceId} value={one.workspaceId}>
              {one.workspaceName}
            </option>
          ))}
        </select>
      </FormField>
      {problem && <Notice kind="stop">{problem}</Notice>}
      <div>
        <Button go busy={isBusy ? 'Keeping' : undefined} onClick={() => void keep(workspaceId)}>
          Keep in this workspace
        </Button>
      </div>
    </div>
  );
}

function useKeeping(personId: string) {
  const store = useDeskStore();
  const navigate = useNavigate();
  const keyOf = useWishKey();
  const [isBusy, setBusy] = useState(false);
  const [problem, setProblem] = useState<string | null>(null);
  const keep = async (workspaceId: string) => {
    setBusy(true);
    setProblem(null);
    try {
      const making = { workspaceId, personId, message: 'Kept from the open desk', wish: keyOf(workspaceId) };
      const { id } = await createStudyFromDesk(store.get(), making);
      await navigate(`/w/${workspaceId}/studies/${id}`);
    } catch (error) {
      setProblem(problemSentence(error));
    } finally {
      setBusy(false);
    }
  };
  return { keep, isBusy, problem };
}
