import type { ReactNode } from 'react';

type Props = {
  /** What the sheet is: "Session study". */
  kind: string;
  title: ReactNode;
  cells?: readonly { label: string; value: ReactNode }[];
  actions?: ReactNode;
};

/** The ruled cells at the head of a drawing sheet. */
export function TitleBlock({ kind, title, cells = [], actions }: Props) {
  return (
    <div className="title-block">
      <div className="title-block-title">
        <div className="title-block-kind">{kind}</div>
        {typeof title === 'string' ? <h1>{title}</h1> : title}
      </div>
      {cells.length > 0 && (
        <dl>
          {cells.map(({ label, value }) => (
            <div key={label}>
              <dt>{label}</dt>
              <dd>{value}</dd>
            </div>
          ))}
        </dl>
      )}
      {actions && <div className="title-block-actions">{actions}</div>}
    </div>
  );
}
