import { Dialog as Radix } from 'radix-ui';
import type { ReactNode } from 'react';

type Props = {
  title: string;
  /** One sentence under the title; leave out where the title says it all. */
  about?: string;
  /** Opens the dialog when pressed; leave out where `open` is steered from outside. */
  trigger?: ReactNode;
  open?: boolean;
  onOpenChange?: (open: boolean) => void;
  children: ReactNode;
};

/** A question or a form over the page; Escape, the veil and "Close" leave it. */
export function Dialog({ title, about, trigger, open, onOpenChange, children }: Props) {
  return (
    <Radix.Root open={open} onOpenChange={onOpenChange}>
      {trigger && <Radix.Trigger asChild>{trigger}</Radix.Trigger>}
      <Radix.Portal>
        <Radix.Overlay className="veil" />
        <Radix.Content className="dialog" {...(about ? {} : { 'aria-describedby': undefined })}>
          <div className="flex items-baseline gap-[16px]">
            <Radix.Title>{title}</Radix.Title>
            <Radix.Close className="lnk ml-auto">Close</Radix.Close>
          </div>
          {about && <Radix.Description className="mt-[4px] text-label text-ink2">{about}</Radix.Description>}
          <div className="mt-[12px]">{children}</div>
        </Radix.Content>
      </Radix.Portal>
    </Radix.Root>
  );
}
