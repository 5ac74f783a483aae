import type { StudyIssue } from '@voltiplano/engine';

/** Why a file is refused: each field at fault with its rule and value. */
export function IssueTable({ issues }: { issues: readonly StudyIssue[] }) {
  return (
    <table className="issues">
      <thead>
        <tr>
          <th scope="col">Where</th>
          <th scope="col">What</th>
          <th scope="col">Value</th>
        </tr>
      </thead>
      <tbody>
        {issues.map(({ path, rule, value, message }) => (
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
  );
}
