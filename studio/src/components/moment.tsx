import { formatAgo, formatWholeMoment } from '../lib/moments.ts';
import { useNow } from '../lib/use-now.ts';

type Props = {
  /** RFC 3339. */
  at: string;
};

/** When something was, in words that keep up with the clock; the whole moment stands behind them. */
export function Moment({ at }: Props) {
  const now = useNow();
  return (
    <time dateTime={at} title={formatWholeMoment(at)}>
      {formatAgo(at, new Date(now))}
    </time>
  );
}
