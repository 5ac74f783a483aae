import type { ReactNode } from 'react';

type Props = {
  /** `stop` for what went wrong, said at once; anything else is told when there is time. */
  kind?: 'plain' | 'stop';
  /** One action that mends it. */
  action?: ReactNode;
  children: ReactNode;
};

/** What happened, where, and how to mend it. */
export function Notice({ kind = 'plain', action, children }: Props) {
  return (
    <div className={kind === 'stop' ? 'notice stop' : 'notice'} role={kind === 'stop' ? 'alert' : 'status'}>
      {children}
      {action && <span className="ml-[12px]">{action}</span>}
    </div>
  );
}
