import { formatAgo } from '../../../lib/moments.ts';
import type { SaverState } from './working-copy-saver.ts';

export type SaveWords = {
  text: string;
  /** What went wrong is also told to those who do not look. */ isTrouble: boolean;
};

/** Whether what is on the desk is kept, in words. */
export function saveWords({ phase, isHeld }: SaverState, now: number): SaveWords {
  const held = isHeld
    ? 'Your changes are held in this browser.'
    : 'This browser refuses to hold your changes: export the study file.';
  switch (phase.kind) {
    case 'kept':
      return {
        text: phase.at === null ? 'on the server' : formatAgo(new Date(phase.at).toISOString(), new Date(now)),
        isTrouble: false,
      };
    case 'saving':
      return isHeld
        ? { text: 'saving', isTrouble: false }
        : { text: 'saving. This browser refuses to hold changes', isTrouble: true };
    case 'offline':
      return { text: `Not kept: no connection. ${held}`, isTrouble: true };
    case 'signed-out':
      return { text: `Not kept: signed out. ${held}`, isTrouble: true };
    case 'refused':
      return { text: `Not kept. ${ended(phase.why)} ${held}`, isTrouble: true };
    case 'conflict': {
      const name = phase.theirs.changedBy?.name ?? 'somebody else';
      return { text: `Not kept: changed by ${name} as well. ${held}`, isTrouble: true };
    }
  }
}

function ended(sentence: string): string {
  return sentence.endsWith('.') ? sentence : `${sentence}.`;
}
