import type { PersonRef } from '../../../../../server/src/contract/reference.ts';
import { Moment } from '../../../components/moment.tsx';

type Props = { by: PersonRef; at: string };

/** Who did something, and when. */
export function WhoWhen({ by, at }: Props) {
  return (
    <span className="who-when">
      <span>{by?.name ?? 'an account that is gone'}</span> <Moment at={at} />
    </span>
  );
}
