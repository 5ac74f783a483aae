import type { PersonRef } from '../../../../../server/src/contract/reference.ts';
import { momentText } from '../../../lib/moment-text.ts';
import { useNow } from '../hooks/use-now.ts';

type Props = { by: PersonRef; at: string };

/** Who did something, and when; the whole moment is read where the pointer rests. */
export function WhoWhen({ by, at }: Props) {
  return (
    <span className="who-when">
      <span>{by?.name ?? 'an account that is gone'}</span> <When at={at} />
    </span>
  );
}

function When({ at }: { at: string }) {
  const now = useNow();
  return (
    <time dateTime={at} title={new Date(at).toLocaleString()}>
      {momentText(at, now)}
    </time>
  );
}
