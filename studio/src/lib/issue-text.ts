import { quantities, type StudyIssue } from '@voltiplano/engine';
import { numberText, quantityPathOf, shownUnit, toShown, type Measure } from '../components/fields/measure.ts';
import type { TemperatureUnit } from './units.ts';

/** What a field is called: the label of its quantity, or its path where it has none. */
export function labelOfPath(path: string): string {
  const quantity = quantityPathOf(path);
  return quantity ? quantities[quantity].label : path;
}

/**
 * The sentence beside a field: the path taken off, other fields called by their labels, numbers in the units on screen.
 *
 * @param measure  how the field is shown; without one numbers stay as the file has them
 */
export function issueSentence(issue: StudyIssue, measure: Measure | undefined, temperature: TemperatureUnit): string {
  if (issue.rule === 'missing' && issue.message.endsWith('is missing')) return 'Needs a value.';
  if (issue.rule === 'not-a-number') return `Must be a number, but is “${issue.value}”.`;
  const bare = issue.message.startsWith(issue.path) ? issue.message.slice(issue.path.length).trim() : issue.message;
  const named = withLabels(bare, issue.path);
  const told = measure ? withShownNumbers(named, measure, temperature) : named;
  return `${told.charAt(0).toUpperCase()}${told.slice(1)}.`.replace(/\.\.$/, '.');
}

/** Parts of a study that messages name and that are no single quantity. */
const PART_NAMES: Record<string, string> = { 'cell.anode': '“Anode” of the cell' };

/** Fields named in a message, such as `fromC` or `cell.vMaxV`, by their labels. */
function withLabels(text: string, path: string): string {
  const parent = path.replace(/(\.[A-Za-z0-9]+|\[\d+\])$/, '');
  return text.replace(/\b[a-z][A-Za-z0-9]*(?:\.[a-zA-Z0-9]+|\[\d+\])*/g, (word) => {
    const quantity = quantityPathOf(word) ?? quantityPathOf(`${parent}.${word}`);
    return quantity ? `“${quantities[quantity].label}”` : (PART_NAMES[word] ?? word);
  });
}

function withShownNumbers(text: string, measure: Measure, temperature: TemperatureUnit): string {
  const unit = shownUnit(measure, temperature);
  // Numbers inside a quoted label, such as “COP at 35 °C”, belong to the name; a unit already there is not said twice.
  const told = /“[^”]*”|(?<![\w[])(-?\d+(?:\.\d+)?(?:e-?\d+)?)(?: mV\b)?/g;
  return text.replace(told, (found, number?: string) => {
    if (number === undefined) return found;
    const shown = numberText(toShown(Number(number), measure, temperature), 0);
    return unit ? `${shown} ${unit}` : shown;
  });
}
