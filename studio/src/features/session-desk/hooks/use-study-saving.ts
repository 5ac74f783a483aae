import { useQuery } from '@tanstack/react-query';
import { useEffect } from 'react';
import type { WorkingCopy } from '../../../../../server/src/contract/study.ts';
import { toast } from '../../../components/toasts.tsx';
import { sessionEnd } from '../../../lib/api/session-end.ts';
import { studyQuery, type StudyPlace } from '../api/study-query.ts';
import type { DeskStore } from '../model/desk-store.ts';
import { changesBy } from '../model/opened-desk.ts';
import { contentMark, contentOf, contentOfWorking } from '../model/working-content.ts';
import type { WorkingCopySaver } from '../model/working-copy-saver.ts';
import type { OpenedStudyDesk } from './open-study-desk.ts';

/** How long the hand rests before the desk with its undo is written down [ms]. */
const KEEP_REST_MS = 250;

/** Saves the study while it is on the desk, and takes in what others made of it. */
export function useStudySaving(opened: OpenedStudyDesk, place: StudyPlace, mayEdit: boolean): void {
  useChangesSaved(opened, mayEdit);
  useMomentsToTry(opened.saver);
  useOthersTaken(opened, place);
}

function useChangesSaved({ store, saver, keep }: OpenedStudyDesk, mayEdit: boolean): void {
  // Speaks to this browser's storage and the server.
  useEffect(() => {
    if (!mayEdit) return;
    let waiting: ReturnType<typeof setTimeout> | undefined;
    const keepNow = () => {
      clearTimeout(waiting);
      waiting = undefined;
      keep();
    };
    const unsubscribe = store.subscribe(() => {
      saver.changed(contentOf(store.get().sheet));
      clearTimeout(waiting);
      waiting = setTimeout(keepNow, KEEP_REST_MS);
    });
    const leave = () => {
      saver.flush();
      if (waiting !== undefined) keepNow();
    };
    window.addEventListener('pagehide', leave);
    document.addEventListener('visibilitychange', leave);
    return () => {
      unsubscribe();
      leave();
      saver.stop();
      window.removeEventListener('pagehide', leave);
      document.removeEventListener('visibilitychange', leave);
    };
  }, [store, saver, keep, mayEdit]);
}

/** Moments at which it is worth trying again at once. */
function useMomentsToTry(saver: WorkingCopySaver): void {
  // Speaks to the browser's connection, and to who is signed in.
  useEffect(() => {
    const retry = () => {
      if (!sessionEnd.get()) saver.retry();
    };
    const unsubscribe = sessionEnd.subscribe(retry);
    window.addEventListener('online', retry);
    window.addEventListener('focus', retry);
    return () => {
      unsubscribe();
      window.removeEventListener('online', retry);
      window.removeEventListener('focus', retry);
    };
  }, [saver]);
}

/** What others saved meanwhile comes onto a desk where nothing is unsent; it stands under undo. */
function useOthersTaken({ store, saver }: OpenedStudyDesk, place: StudyPlace): void {
  const { data, refetch } = useQuery(studyQuery(place));
  const working = data?.working;
  // Speaks to the window: two windows side by side are both visible, but one is looked at.
  useEffect(() => {
    const look = () => void refetch();
    window.addEventListener('focus', look);
    return () => window.removeEventListener('focus', look);
  }, [refetch]);
  // Speaks to the desk, which stands beside React.
  useEffect(() => {
    const copy = working && saver.heard(working);
    if (copy) takeCopy(store, saver, copy);
  }, [store, saver, working]);
}

function takeCopy(store: DeskStore, saver: WorkingCopySaver, copy: WorkingCopy): void {
  const theirs = contentOfWorking(copy);
  const isOther = contentMark(theirs) !== contentMark(store.get().sheet);
  if (isOther) putOnDesk(store, copy);
  saver.took(copy);
  if (!isOther || store.get().readOnly) return;
  const undo = { word: 'Undo', take: () => store.dispatch({ type: 'undo' }) };
  toast(`Taken: ${changesBy(copy)}, just now`, { action: undo });
}

/** Another's copy takes the place of what is on the desk, as one step of undo; what is only read just follows. */
export function putOnDesk(store: DeskStore, copy: WorkingCopy, label = changesBy(copy)): void {
  const { draft, references } = contentOfWorking(copy);
  store.dispatch({ type: 'draft', draft, references, label });
}
