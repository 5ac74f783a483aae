import { useNavigate } from 'react-router-dom';
import type { Study } from '../../../../../server/src/contract/study.ts';
import { toast } from '../../../components/toasts.tsx';
import { useWorkspace } from '../../../lib/session/use-workspace.ts';
import { studiesWord } from '../model/row-words.ts';

/** After an import from the page of new studies: one study opens on its desk, several are shown in the list. */
export function useOpenImported(): (studies: readonly Study[], isAll: boolean) => void {
  const { workspaceId } = useWorkspace();
  const navigate = useNavigate();
  return (studies, isAll) => {
    const [first] = studies;
    if (!first) return;
    const isOne = studies.length === 1;
    toast(isOne ? `Imported “${first.title}”.` : `Imported ${studiesWord(studies.length)}.`);
    const list = `/w/${workspaceId}/studies`;
    if (isAll) void navigate(isOne ? `${list}/${first.id}` : list);
  };
}
