import { Dialog } from '../../../components/dialog.tsx';
import { deskShortcuts } from '../hooks/use-desk-shortcuts.ts';

type Props = {
  open: boolean;
  onOpenChange: (open: boolean) => void;
  /** What Ctrl S does here, where it is not saving a file. */
  saves?: string | undefined;
};

export function ShortcutsDialog({ open, onOpenChange, saves }: Props) {
  return (
    <Dialog title="Keys" open={open} onOpenChange={onOpenChange}>
      <dl className="keys">
        {deskShortcuts.map(({ keys, does }) => (
          <div key={keys}>
            <dt className="num">{keys}</dt>
            <dd>{keys === 'Ctrl S' ? (saves ?? does) : does}</dd>
          </div>
        ))}
      </dl>
    </Dialog>
  );
}
