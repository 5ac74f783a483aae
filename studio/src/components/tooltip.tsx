import { Tooltip as Radix } from 'radix-ui';
import type { ReactNode } from 'react';

type Props = { text: ReactNode; children: ReactNode };

/** A few words beside a control, on hover and on focus; never the only place where something is said. */
export function Tooltip({ text, children }: Props) {
  return (
    <Radix.Root>
      <Radix.Trigger asChild>{children}</Radix.Trigger>
      <Radix.Portal>
        <Radix.Content className="tip" sideOffset={6} collisionPadding={8}>
          {text}
        </Radix.Content>
      </Radix.Portal>
    </Radix.Root>
  );
}
