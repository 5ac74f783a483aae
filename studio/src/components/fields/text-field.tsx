import { useReadOnly } from './read-only.ts';

type Props = { label: string; value: string; was?: string; onText: (text: string) => void; onLeave?: () => void };

/** A name or remark: label left, words right. */
export function TextField({ label, value, was, onText, onLeave }: Props) {
  const readOnly = useReadOnly();
  return (
    <label className="f words">
      <span className="f-label">
        {label}
        {was !== undefined && <span className="was">was {was}</span>}
      </span>
      <span className={was === undefined ? 'in' : 'in moved'}>
        <input
          value={value}
          readOnly={readOnly}
          maxLength={200}
          autoComplete="off"
          spellCheck={false}
          onChange={(event) => onText(event.target.value)}
          onBlur={onLeave}
        />
      </span>
    </label>
  );
}
