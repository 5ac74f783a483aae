import { useState } from 'react';
import { useNavigate } from 'react-router-dom';
import type { Study } from '../../../../../server/src/contract/study.ts';
import { Dialog } from '../../../components/dialog.tsx';
import { toast } from '../../../components/toasts.tsx';
import { useWorkspace } from '../../../lib/session/use-workspace.ts';
import { studiesWord } from '../model/row-words.ts';
import { ImportFiles } from './import-files.tsx';

type Props = { files: readonly File[]; onClose: () => void };

/** Study files into the list. It closes by itself once all of them are studies. */
export function ImportDialog({ files, onClose }: Props) {
  const { workspaceId } = useWorkspace();
  const navigate = useNavigate();
  const [handedOver] = useState(files);
  const onMade = (studies: Study[], isAll: boolean) => {
    const [first] = studies;
    if (first && studies.length === 1) {
      const open = { word: 'Open', take: () => void navigate(`/w/${workspaceId}/studies/${first.id}`) };
      toast(`Imported “${first.title}”.`, { action: open });
    } else toast(`Imported ${studiesWord(studies.length)}.`);
    if (isAll) onClose();
  };
  return (
    <Dialog title="Import study files" open onOpenChange={(isOpen) => !isOpen && onClose()}>
      <ImportFiles files={handedOver} onMade={onMade} />
    </Dialog>
  );
}
