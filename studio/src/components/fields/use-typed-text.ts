import { useState } from 'react';
import { readNumber } from './measure.ts';

/** Texts are cut at six decimals; what was typed beyond them is still the same number. */
const SAME_WITHIN = 1e-6;

/**
 * What an input shows while it is typed in: the text as typed, for as long as it says the same as the value.
 * When the value changes from elsewhere (undo, an arrow key), the value's own text is shown at once.
 *
 * @param text  the value, as the input shows it at rest
 */
export function useTypedText(text: string) {
  const [typed, setTyped] = useState<string | null>(null);
  const shown = typed !== null && saysTheSame(typed, text) ? typed : text;
  return { shown, setTyped };
}

function saysTheSame(typed: string, text: string): boolean {
  const a = readNumber(typed);
  const b = readNumber(text);
  if (Number.isNaN(a) || Number.isNaN(b)) return typed.trim() === text.trim();
  return Math.abs(a - b) <= SAME_WITHIN * Math.max(1, Math.abs(a));
}
