import { Dialog } from '../../../components/dialog.tsx';
import { deskShortcuts } from '../hooks/use-desk-shortcuts.ts';

type Props = { open: boolean; onOpenChange: (open: boolean) => void };

export function ShortcutsDialog({ open, onOpenChange }: Props) {
  return (
    <Dialog title="Keys" open={open} onOpenChange={onOpenChange}>
      <dl className="keys">
        {deskShortcuts.map(({ keys, does }) => (
          <div key={keys}>
            <dt className="num">{keys}</dt>
            <dd>{does}</dd>
          </div>
        ))}
      </dl>
    </Dialog>
  );
}
