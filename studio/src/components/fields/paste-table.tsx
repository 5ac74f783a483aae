import { useState } from 'react';
import { Button } from '../button.tsx';
import { Dialog } from '../dialog.tsx';

type Props = {
  title: string;
  /** Columns with their units, in order. */
  columns: readonly string[];
  /** Takes the whole text; the table it makes takes the place of the one before. */
  onText: (text: string) => void;
};

/** A place to paste a whole table into, for pointers and telephones without a clipboard key. */
export function PasteTable({ title, columns, onText }: Props) {
  const [open, setOpen] = useState(false);
  const [text, setText] = useState('');
  const accept = () => {
    if (text.trim() !== '') onText(text);
    setText('');
    setOpen(false);
  };
  return (
    <Dialog
      title={`Paste: ${title}`}
      about={`Rows from a spreadsheet, columns in this order: ${columns.join(', ')}. A header row is left out; a decimal comma is read. The table takes the place of the present one.`}
      trigger={
        <button type="button" className="lnk">
          Paste a table
        </button>
      }
      open={open}
      onOpenChange={setOpen}
    >
      <textarea
        className="paste-box"
        aria-label="Rows"
        spellCheck={false}
        value={text}
        onChange={(event) => setText(event.target.value)}
      />
      <div className="mt-[12px]">
        <Button go onClick={accept}>
          Use this table
        </Button>
      </div>
    </Dialog>
  );
}
