import type { ReactNode } from 'react';

type Props = {
  name: string;
  cells: ReactNode[];
  /** What the row did: "15.7", "idle". */
  did?: { text: string; idle: boolean };
  hasDid: boolean;
  onDelete?: () => void;
};

/** One row of a table editor, with what it did and a word to delete it. */
export function TableRow({ name, cells, did, hasDid, onDelete }: Props) {
  return (
    <tr>
      {cells.map((cell, column) => (
        <td key={column}>{cell}</td>
      ))}
      {hasDid && <td className={did?.idle ? 'r did idle' : 'r did'}>{did?.text}</td>}
      <td className="rowact">
        {onDelete && (
          <button type="button" className="lnk" aria-label={`Delete ${name}`} onClick={onDelete}>
            Delete
          </button>
        )}
      </td>
    </tr>
  );
}
