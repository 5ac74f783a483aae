import { numberText, readNumber, type Measure } from './measure.ts';

export type StepKey = { key: string; shiftKey: boolean; altKey: boolean; ctrlKey: boolean; metaKey: boolean };

/**
 * The text a field shows after an arrow key: one step up or down, ten with Shift, held to the allowed range.
 *
 * @param text   what the field shows; from an empty field the step starts at `start`
 * @param range  allowed values, in shown units
 * @returns      undefined where the key is none of these or the text is no number
 */
export function steppedText(
  { key, shiftKey, altKey, ctrlKey, metaKey }: StepKey,
  text: string,
  { step, decimals }: Pick<Measure, 'step' | 'decimals'>,
  range: { min: number; max: number },
  start?: number,
): string | undefined {
  if ((key !== 'ArrowUp' && key !== 'ArrowDown') || altKey || ctrlKey || metaKey) return undefined;
  const from = text.trim() === '' ? start : readNumber(text);
  if (from === undefined || Number.isNaN(from)) return undefined;
  const by = step * (shiftKey ? 10 : 1) * (key === 'ArrowUp' ? 1 : -1);
  const to = Math.min(range.max, Math.max(range.min, from + by));
  return numberText(Number(to.toPrecision(12)), decimals);
}
