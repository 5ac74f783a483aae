import { useState } from 'react';
import { Button } from '../../../components/button.tsx';
import { ConfirmDialog } from '../../../components/confirm.tsx';
import { Menu, MenuHeading, MenuItem, MenuRule } from '../../../components/menu.tsx';
import { useWorkspace } from '../../../lib/session/use-workspace.ts';
import { useStudyDesk } from '../hooks/study-desk-context.ts';
import { useStudy } from '../hooks/use-study.ts';
import { useDispatch } from '../hooks/use-desk.ts';
import { useStudyDeeds } from '../hooks/use-study-deeds.ts';
import type { HeadTools } from './session-desk.tsx';

/** What is done seldom: baseline, files, copy, archive. */
export function StudyMoreMenu({ tools: { files, pickFile, showKeys } }: { tools: HeadTools }) {
  const { place, mayEdit } = useStudyDesk();
  const { archivedAt } = useStudy();
  const { may } = useWorkspace();
  const dispatch = useDispatch();
  const deeds = useStudyDeeds(place);
  const [isAsking, setAsking] = useState(false);
  return (
    <>
      <Menu trigger={<Button>Study</Button>} align="end">
        <MenuItem onSelect={() => dispatch({ type: 'keep-baseline' })}>Keep as baseline</MenuItem>
        <MenuRule />
        {mayEdit && <MenuItem onSelect={pickFile}>Open a study file</MenuItem>}
        <MenuItem onSelect={files.save}>Export the study file</MenuItem>
        <MenuItem onSelect={() => void deeds.copyLink()}>Copy the link</MenuItem>
        {may('edit-studies') && (
          <>
            <MenuRule />
            <MenuItem onSelect={() => void deeds.copy()}>Copy to a new study</MenuItem>
            {archivedAt === null ? (
              <MenuItem onSelect={() => setAsking(true)}>Put into the archive</MenuItem>
            ) : (
              <MenuItem onSelect={() => void deeds.unarchive()}>Take out of the archive</MenuItem>
            )}
          </>
        )}
        <MenuRule />
        <MenuHeading>Help</MenuHeading>
        <MenuItem onSelect={showKeys}>Keys</MenuItem>
      </Menu>
      <ArchiveQuestion open={isAsking} onOpenChange={setAsking} />
    </>
  );
}

type QuestionProps = { open: boolean; onOpenChange: (open: boolean) => void };

function ArchiveQuestion(props: QuestionProps) {
  const { place, saver } = useStudyDesk();
  const { archive } = useStudyDeeds(place);
  return (
    <ConfirmDialog
      {...props}
      title="Put this study into the archive?"
      about="It can still be read and copied, and no longer changed. Taking it out again brings everything back."
      confirm="Put into the archive"
      busy="Archiving"
      onConfirm={async () => {
        await saver.saved();
        await archive();
      }}
    />
  );
}
