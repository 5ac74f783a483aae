import { AlertDialog } from 'radix-ui';
import { useState, type ReactNode } from 'react';
import { problemSentence } from '../lib/api/api-problem.ts';
import { Button } from './button.tsx';
import { Notice } from './notice.tsx';

type Props = {
  title: string;
  /** What happens, and what cannot be undone. */
  about: string;
  /** Opens the question when pressed; leave out where `open` is steered from outside. */
  trigger?: ReactNode;
  open?: boolean;
  onOpenChange?: (open: boolean) => void;
  /** The word of the deed, such as "Remove". */
  confirm: string;
  busy: string;
  /** Word that leaves everything as it is. */
  cancel?: string;
  /** Does it; the question stays, with the reason, if this rejects. */
  onConfirm: () => Promise<unknown>;
  children?: ReactNode;
};

/** Asks before what cannot be undone. */
export function ConfirmDialog(props: Props) {
  const { title, about, trigger, confirm, busy, cancel = 'Cancel', onConfirm, children } = props;
  const [ownOpen, setOwnOpen] = useState(false);
  const [isBusy, setBusy] = useState(false);
  const [problem, setProblem] = useState<string | null>(null);
  const setOpen = (open: boolean) => {
    setProblem(null);
    setOwnOpen(open);
    props.onOpenChange?.(open);
  };
  const take = async () => {
    setBusy(true);
    setProblem(null);
    try {
      await onConfirm();
      setOpen(false);
    } catch (error) {
      setProblem(problemSentence(error));
    } finally {
      setBusy(false);
    }
  };
  return (
    <AlertDialog.Root open={props.open ?? ownOpen} onOpenChange={setOpen}>
      {trigger && <AlertDialog.Trigger asChild>{trigger}</AlertDialog.Trigger>}
      <AlertDialog.Portal>
        <AlertDialog.Overlay className="veil" />
        <AlertDialog.Content className="dialog">
          <AlertDialog.Title>{title}</AlertDialog.Title>
          <AlertDialog.Description className="mt-[4px] text-label text-ink2">{about}</AlertDialog.Description>
          {children && <div className="mt-[12px]">{children}</div>}
          {problem && (
            <div className="mt-[12px]">
              <Notice kind="stop">{problem}</Notice>
            </div>
          )}
          <div className="dialog-actions">
            <AlertDialog.Cancel asChild>
              <Button>{cancel}</Button>
            </AlertDialog.Cancel>
            <Button go busy={isBusy ? busy : undefined} onClick={() => void take()}>
              {confirm}
            </Button>
          </div>
        </AlertDialog.Content>
      </AlertDialog.Portal>
    </AlertDialog.Root>
  );
}
