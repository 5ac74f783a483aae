import { Dialog } from '../../../components/dialog.tsx';
import { IssueTable } from '../../../components/issue-table.tsx';
import type { OpenReport } from '../hooks/open-linked-study.ts';

type Props = { report: OpenReport | null; onClose: () => void };

/** Why a study could not be opened: each field at fault with its rule and value. What was on the desk stays there. */
export function OpenReportDialog({ report, onClose }: Props) {
  return (
    <Dialog
      title="Not opened"
      about={report ? `Cannot open ${report.what}. The study on the desk is as it was.` : undefined}
      open={report !== null}
      onOpenChange={(open) => !open && onClose()}
    >
      <IssueTable issues={report?.issues ?? []} />
    </Dialog>
  );
}
