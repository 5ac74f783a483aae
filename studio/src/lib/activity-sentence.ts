import type { Activity } from '../../../server/src/contract/workspace.ts';

/** A piece of a sentence: words, or words that lead to a page. */
export type Piece = string | { to: string; text: string };

export type Sentence = {
  pieces: Piece[];
  /** What was said about it, such as the message of a revision. */
  message: string | null;
};

/** `subject` is null where the sentence stands on the page of its own subject. */
type Telling = (detail: Record<string, string>, subject: ((text: string) => Piece) | null) => Piece[];

const revisionOf = (detail: Record<string, string>) => (detail.revision ? `, revision ${detail.revision}` : '');
/** The library's kinds go by their own names, but for the one that people call otherwise. */
const part = ({ kind, name }: Record<string, string>) =>
  [kind === 'thermal' ? 'cooling' : kind, name].filter(Boolean).join(' ');
const study = ({ number, title }: Record<string, string>) => [number, title].filter(Boolean).join(' ');

const aboutPart =
  (verb: string, rest = ''): Telling =>
  (detail, subject) =>
    subject
      ? [`${verb} the `, subject(part(detail)), revisionOf(detail), rest]
      : [`${verb} this part`, revisionOf(detail), rest];
const aboutStudy =
  (verb: string, rest = ''): Telling =>
  (detail, subject) =>
    subject
      ? [`${verb} study `, subject(study(detail)), revisionOf(detail), rest]
      : [`${verb} this study`, revisionOf(detail), rest];

/** What each action of the log reads as, after the name of who did it. */
const tellings: Record<string, Telling> = {
  'workspace.created': ({ name }) => [`made the workspace ${name}`],
  'workspace.renamed': ({ from, to }) => [`renamed the workspace from ${from} to ${to}`],
  'member.joined': ({ role }) => [`joined as ${role}`],
  'member.roleChanged': ({ name, from, to }) => [`changed ${name} from ${from} to ${to}`],
  'member.removed': ({ name }) => [`removed ${name}`],
  'member.left': () => ['left the workspace'],
  'invitation.sent': ({ email, role }) => [`invited ${email} as ${role}`],
  'invitation.resent': ({ email, role }) => [`sent the invitation to ${email} as ${role} again`],
  'invitation.withdrawn': ({ email }) => [`withdrew the invitation to ${email}`],
  'apiToken.created': ({ name, role }) => [`made the API token ${name} as ${role}`],
  'apiToken.revoked': ({ name }) => [`revoked the API token ${name}`],
  'library.added': aboutPart('added'),
  'library.revised': aboutPart('revised'),
  'library.restored': aboutPart('restored an earlier revision of'),
  'library.archived': aboutPart('put', ' into the archive'),
  'library.unarchived': aboutPart('took', ' out of the archive'),
  'library.imported': aboutPart('imported'),
  'study.created': aboutStudy('created'),
  'study.revised': aboutStudy('revised'),
  'study.copied': aboutStudy('made', ' as a copy'),
  'study.archived': aboutStudy('put', ' into the archive'),
  'study.unarchived': aboutStudy('took', ' out of the archive'),
};

/**
 * One deed as a sentence, whose subject leads to its page where there is one.
 *
 * @param deed  as the log holds it: names and values are those of then
 * @param here  id of the study or part whose page the sentence stands on, which it then need not name
 */
export function activitySentence(workspaceId: string, deed: Activity, here?: string): Sentence {
  const who = deed.personName ?? 'Somebody whose account is gone';
  const telling = tellings[deed.action];
  const subject = (text: string): Piece => {
    const to = pageOf(workspaceId, deed);
    return to ? { to, text } : text;
  };
  const told = telling ? telling(deed.detail, deed.subjectId === here ? null : subject) : [`did ${deed.action}`];
  return { pieces: [`${who} `, ...told].filter((piece) => piece !== ''), message: saidBeside(deed) };
}

/** The server gives imports a message of its own, which would say the same twice. */
function saidBeside({ action, detail }: Activity): string | null {
  return action === 'library.imported' ? null : detail.message || null;
}

function pageOf(workspaceId: string, { action, subjectId }: Activity): string | null {
  if (!subjectId) return null;
  if (action.startsWith('study.')) return `/w/${workspaceId}/studies/${subjectId}`;
  return action.startsWith('library.') ? `/w/${workspaceId}/library/${subjectId}` : null;
}
