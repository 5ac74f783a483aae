import type { LimitCode, SessionResult } from '@voltiplano/engine';
import { formatNumber, formatSoc } from '../../../lib/format.ts';

/** A piece of the sentence: words, a figure, or the name of a limit with its swatch. */
export type SentencePiece = { words: string } | { figure: string } | { limit: LimitCode; name: string };

const NAMES: Record<LimitCode, string> = {
  'station-current': 'the station’s current',
  'station-power': 'the station’s power',
  'station-voltage': 'the station’s voltage',
  'station-ramp': 'the ramp after plug-in',
  inlet: 'the inlet',
  'pack-current': 'the pack’s current',
  taper: 'the taper',
  'cell-voltage': 'the voltage ceiling',
  anode: 'the anode margin',
  hot: 'the hot limit',
  cold: 'the cold limit',
};

/** Minutes below which a second limit is not worth a word. */
const WORTH_SAYING_MIN = 0.5;

const words = (text: string): SentencePiece => ({ words: text });
const minutes = (value: number): SentencePiece => ({ figure: formatNumber(value, 1) });
const percent = (soc: number): SentencePiece[] => [{ figure: formatSoc(soc) }, words(' %')];

/** What holds a session back and for how long, what comes second, and what ends it. */
export function sessionSentence({ metrics, series }: SessionResult): SentencePiece[] {
  const held = (Object.entries(metrics.limitMinutes) as [LimitCode, number][]).sort((a, b) => b[1] - a[1]);
  const [first, second] = held;
  if (!first || first[1] === 0) return [words('The session ends at once: it starts at its target.')];
  const pieces: SentencePiece[] = [
    limit(first[0], true),
    words(' holds this session back for '),
    minutes(first[1]),
    words(' of its '),
    minutes(metrics.endMin),
    words(' minutes'),
  ];
  if (second && second[1] >= WORTH_SAYING_MIN)
    pieces.push(words(', '), limit(second[0]), words(' for '), minutes(second[1]));
  return [...pieces, words('. '), ...ending(metrics, series.limit.at(-1)!)];
}

function ending(metrics: SessionResult['metrics'], last: LimitCode): SentencePiece[] {
  switch (metrics.endReason) {
    case 'cutoff':
      return [limit(last, true), words(' ends it at '), ...percent(metrics.endSoc), words('.')];
    case 'target':
      return [
        words('It ends at its target of '),
        ...percent(metrics.endSoc),
        words(', held by '),
        limit(last),
        words('.'),
      ];
    case 'maxMin':
      return [words('It stops at '), ...percent(metrics.endSoc), words(', after the longest time allowed.')];
  }
}

function limit(code: LimitCode, starts = false): SentencePiece {
  const name = NAMES[code];
  return { limit: code, name: starts ? `${name.charAt(0).toUpperCase()}${name.slice(1)}` : name };
}

/** The sentence as plain text, for the clipboard and screen readers. */
export function sentenceText(pieces: SentencePiece[]): string {
  return pieces
    .map((piece) => ('words' in piece ? piece.words : 'figure' in piece ? piece.figure : piece.name))
    .join('');
}
