import { parseStudyText, parseSweepText, parseTuneRequest } from '../src/index.ts';

/**
 * What a valid file is, in a sentence.
 *
 * @param text  of a study, a sweep or a request to tune
 * @throws {StudyError} with what is wrong with it
 */
export function checkFile(text: string): string {
  const named = (title: string | undefined) => (title ? `, “${title}”` : '');
  const head = headOf(text);
  if (head.format === 'voltiplano/tune')
    return `Valid: a request to tune${named(parseTuneRequest(JSON.parse(text)).title)}.\n`;
  if (head.kind === 'sweep') {
    const { size, title } = parseSweepText(text);
    return `Valid: a sweep of ${size} runs${named(title)}.\n`;
  }
  const study = parseStudyText(text);
  return `Valid: a ${study.kind} study${named(study.title)}.\n`;
}

/** What a file says it is; nothing where it is no JSON, which its reader then says. */
function headOf(text: string): { format?: unknown; kind?: unknown } {
  try {
    return (JSON.parse(text) as { format?: unknown; kind?: unknown } | null) ?? {};
  } catch {
    return {};
  }
}
