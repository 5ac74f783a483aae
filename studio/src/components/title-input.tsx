type Props = {
  label: string;
  value: string;
  /** Stands there while the field is empty. */
  placeholder: string;
  maxLength: number;
  isWrong?: boolean;
  onText: (text: string) => void;
  onLeave?: () => void;
};

/** A title that is typed where it stands: one line of text, shown on as many as it needs. */
export function TitleInput({ label, value, placeholder, maxLength, isWrong, onText, onLeave }: Props) {
  return (
    <span className="title-input" data-text={value}>
      <textarea
        aria-label={label}
        aria-invalid={isWrong || undefined}
        rows={1}
        value={value}
        placeholder={placeholder}
        maxLength={maxLength}
        autoComplete="off"
        spellCheck={false}
        onChange={(event) => onText(event.target.value.replace(/\s*\n\s*/g, ' '))}
        onKeyDown={(event) => {
          if (event.key !== 'Enter') return;
          event.preventDefault();
          event.currentTarget.blur();
        }}
        onBlur={onLeave}
      />
    </span>
  );
}
