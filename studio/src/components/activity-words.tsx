import { Link } from 'react-router-dom';
import type { Piece } from '../lib/activity-sentence.ts';

type Props = { pieces: readonly Piece[] };

/** A sentence of the activity log, with links where it leads somewhere. */
export function ActivityWords({ pieces }: Props) {
  return pieces.map((piece, i) =>
    typeof piece === 'string' ? (
      piece
    ) : (
      <Link key={i} to={piece.to}>
        {piece.text}
      </Link>
    ),
  );
}
