import { Dialog } from '../../../components/dialog.tsx';
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
      <table className="issues">
        <thead>
          <tr>
            <th scope="col">Where</th>
            <th scope="col">What</th>
            <th scope="col">Value</th>
          </tr>
        </thead>
        <tbody>
          {report?.issues.map(({ path, rule, value, message }) => (
            <tr key={`${path} ${rule} ${message}`}>
              <td className="num">{path || 'file'}</td>
              <td>
                {message}
                <span className="rule">{rule}</span>
              </td>
              <td className="num">{value ?? ''}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </Dialog>
  );
}
