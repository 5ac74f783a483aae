import { saveFile } from '../../../charts/chart-export.ts';
import { useCallback, useMemo, useState } from 'react';
import type { DeskStore } from '../model/desk-store.ts';
import type { Example } from '../../../lib/examples.ts';
import { studyFile, type TextFile } from '../model/export-files.ts';
import { readStudyFile } from '../model/study-file.ts';
import { studyLink } from '../model/study-link.ts';
import { openLinkedStudy, type OpenReport } from './open-linked-study.ts';

export type StudyFiles = {
  report: OpenReport | null;
  forgetReport: () => void;
  openFile: (file: File) => Promise<void>;
  openExample: (example: Example) => Promise<void>;
  /** Opens the study that the page's address carries, if it carries one. */
  openLink: () => Promise<void>;
  save: () => void;
  /** Copies a link to the study; gives what to say about it. */
  copyLink: () => Promise<string>;
};

/** Study files, examples and links, to and from the desk. */
export function useStudyFiles(store: DeskStore, firstReport: OpenReport | null): StudyFiles {
  const [report, setReport] = useState(firstReport);
  const openFile = useCallback(
    async (file: File) => {
      const opened = readStudyFile(await file.text());
      if ('issues' in opened) setReport({ what: file.name, issues: opened.issues });
      else store.dispatch({ type: 'open', study: opened.study, label: `open ${file.name}` });
    },
    [store],
  );
  const save = useCallback(() => downloadText(studyFile(store.get().sheet.draft.study)), [store]);
  return useMemo(
    () => ({
      report,
      forgetReport: () => setReport(null),
      openFile,
      save,
      openExample: async (example) =>
        store.dispatch({ type: 'open', study: await example.load(), label: `open ${example.title}` }),
      openLink: async () => setReport(await openLinkedStudy(store)),
      copyLink: () => copyLinkOf(store),
    }),
    [report, openFile, save, store],
  );
}

export function downloadText({ name, text, type }: TextFile): void {
  saveFile(new Blob([text], { type }), name);
}

async function copyLinkOf(store: DeskStore): Promise<string> {
  const page = window.location.origin + window.location.pathname;
  const made = await studyLink(store.get().sheet.draft.study, page);
  if ('refusal' in made) return made.refusal;
  try {
    await navigator.clipboard.writeText(made.link);
    return 'Link copied. It carries the whole study; it is not kept anywhere else.';
  } catch {
    return 'Not copied: this browser refuses the clipboard. Save the study and send the file.';
  }
}
