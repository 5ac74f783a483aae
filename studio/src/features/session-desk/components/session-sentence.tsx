import { LimitName } from '../../../charts/limit-marks.tsx';
import type { SessionResult } from '@voltiplano/engine';
import { sessionSentence, type SentencePiece } from '../model/session-sentence.ts';

/** What holds the session back, for how long, and what ends it. */
export function SessionSentence({ result }: { result: SessionResult }) {
  return (
    <p className="say">
      {sessionSentence(result).map((piece, i) => (
        <Piece key={i} piece={piece} />
      ))}
    </p>
  );
}

function Piece({ piece }: { piece: SentencePiece }) {
  if ('words' in piece) return piece.words;
  if ('figure' in piece) return <span className="num">{piece.figure}</span>;
  return <LimitName code={piece.limit}>{piece.name}</LimitName>;
}
