import { parseStudyText, parseSweepText } from '../src/index.ts';

/**
 * What a valid file is, in a sentence.
 *
 * @param text  of a study or sweep file
 * @throws {StudyError} with what is wrong with it
 */
export function checkFile(text: string): string {
  const named = (title: string | undefined) => (title ? `, “${title}”` : '');
  if (isSweep(text)) {
    const { size, title } = parseSweepText(text);
    return `Valid: a sweep of ${size} runs${named(title)}.\n`;
  }
  const study = parseStudyText(text);
  return `Valid: a ${study.kind} study${named(study.title)}.\n`;
}

function isSweep(text: string): boolean {
  try {
    return (JSON.parse(text) as { kind?: unknown } | null)?.kind === 'sweep';
  } catch {
    return false;
  }
}
