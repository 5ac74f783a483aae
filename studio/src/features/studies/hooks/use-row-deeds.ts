import { useNavigate } from 'react-router-dom';
import type { StudyRow } from '../../../../../server/src/contract/study.ts';
import { saveFile } from '../../../charts/chart-export.ts';
import { fileNameOf } from '../../../charts/export-text.ts';
import { toast } from '../../../components/toasts.tsx';
import { problemSentence } from '../../../lib/api/api-problem.ts';
import { useWorkspace } from '../../../lib/session/use-workspace.ts';
import { studyNumber } from '../../../lib/study-names.ts';
import { useCopyStudy } from '../api/copy-study.ts';
import { useMoveStudy } from '../api/move-study.ts';
import { readStudy } from '../api/read-study.ts';

export type RowDeeds = {
  copy: (row: StudyRow) => void;
  move: (row: StudyRow, toArchive: boolean) => void;
  exportFile: (row: StudyRow) => void;
};

/** What can be done with a study from its row, each told in a strip. */
export function useRowDeeds(): RowDeeds {
  const { workspaceId } = useWorkspace();
  const navigate = useNavigate();
  const copying = useCopyStudy(workspaceId);
  const moving = useMoveStudy(workspaceId);
  const copy = ({ id, title }: StudyRow) =>
    copying.mutate(id, {
      onSuccess: (study) => void navigate(`/w/${workspaceId}/studies/${study.id}`),
      onError: (error) => toast(`“${title}” was not copied. ${problemSentence(error)}`, { kind: 'stop' }),
    });
  const move = (row: StudyRow, toArchive: boolean, isUndo = false) => {
    const done = toArchive ? 'is in the archive' : isUndo ? 'is back in the list' : 'is out of the archive';
    const undo = { word: 'Undo', take: () => move(row, !toArchive, true) };
    // Not as a callback of mutate: what is told must be told also once the page is left.
    moving.mutateAsync({ studyId: row.id, toArchive }).then(
      () => toast(`“${row.title}” ${done}.`, isUndo ? {} : { action: undo }),
      (error: unknown) => toast(`“${row.title}” stays where it is. ${problemSentence(error)}`, { kind: 'stop' }),
    );
  };
  const exportFile = (row: StudyRow) => {
    exportStudy(workspaceId, row).catch((error: unknown) =>
      toast(`“${row.title}” was not exported. ${problemSentence(error)}`, { kind: 'stop' }),
    );
  };
  return { copy, move, exportFile };
}

async function exportStudy(workspaceId: string, { id, number }: StudyRow): Promise<void> {
  const { title, working, revision } = await readStudy(workspaceId, id);
  const text = `${JSON.stringify(working.inputs, null, 2)}\n`;
  saveFile(new Blob([text], { type: 'application/json' }), fileNameOf(`${studyNumber(number)} ${title}`, '', 'json'));
  toast(
    working.isChanged
      ? `Exported “${title}” as it is now, changed since revision ${revision}.`
      : `Exported “${title}”, revision ${revision}.`,
  );
}
