import { kindWords } from '../model/kinds.ts';
import type { FileIssue, Planned } from '../model/library-file.ts';

const FATES = { added: 'will be added', revised: 'gets a revision', left: 'stays as it is' } as const;

/** What will become of each part of a file. */
export function ImportPlan({ plan }: { plan: readonly Planned[] }) {
  const rows = plan.map(({ kind, name, fate }) => [name, kindWords[kind].one, FATES[fate]] as const);
  return <PlainTable name="What will become of each part" heads={['Part', 'Kind', 'Then']} rows={rows} />;
}

/** What is wrong with a file, part by part. */
export function ImportIssues({ issues }: { issues: readonly FileIssue[] }) {
  const rows = issues.map(({ item, path, message }) => [item || 'The file', path, message] as const);
  return <PlainTable name="What is wrong with the file" heads={['Part', 'Field', 'What is wrong']} rows={rows} />;
}

type Triple = readonly [string, string, string];

function PlainTable({ name, heads, rows }: { name: string; heads: Triple; rows: readonly Triple[] }) {
  return (
    <div className="import-table" tabIndex={0} role="group" aria-label={name}>
      <table>
        <caption className="unseen">{name}</caption>
        <thead>
          <tr>
            {heads.map((head) => (
              <th key={head} scope="col">
                {head}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {rows.map(([first, ...others], i) => (
            <tr key={i}>
              <th scope="row">{first}</th>
              {others.map((text, j) => (
                <td key={j}>{text}</td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}
