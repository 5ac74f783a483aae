import { createContext, useContext, useSyncExternalStore } from 'react';
import type { StudyPlace } from '../api/study-query.ts';
import type { SaverState, WorkingCopySaver } from '../model/working-copy-saver.ts';

/** A study of a workspace that stands on the desk. */
export type StudyDesk = {
  place: StudyPlace;
  saver: WorkingCopySaver;
  /** Whether the person's role, and the study itself, let it be changed. */
  mayEdit: boolean;
  mayEditLibrary: boolean;
};

export const StudyDeskContext = createContext<StudyDesk | null>(null);

/** The study on the desk; null on a guest's desk, whose study belongs to nobody. */
export function useStudyDeskIfAny(): StudyDesk | null {
  return useContext(StudyDeskContext);
}

/** @throws {Error} on a guest's desk */
export function useStudyDesk(): StudyDesk {
  const desk = useContext(StudyDeskContext);
  if (!desk) throw new Error('Used on a desk without a study of a workspace');
  return desk;
}

/** How far the desk's changes have come. */
export function useSaver(): SaverState {
  const { saver } = useStudyDesk();
  return useSyncExternalStore(saver.subscribe, saver.get);
}
