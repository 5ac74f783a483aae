import type { StudyIssue } from '@voltiplano/engine';
import { createContext, useContext } from 'react';
import type { PartEntry } from '../model/part-editor.ts';
import type { TripPartKind } from '../model/trip-part.ts';

/** The vehicle or route that is being edited, and the ways to change it. */
export type TripPartDesk = {
  kind: TripPartKind;
  /** As typed. */
  shown: PartEntry['body'];
  /** The last one that can stand, with every default filled in. */
  filled: unknown;
  /** What changes are marked against; null where nothing is. */
  saved: PartEntry['body'] | null;
  /** What is wrong with the part as typed, by paths of a study file. */
  issues: readonly StudyIssue[];
  /** Puts a value at a path of a study file; undefined takes it away. */
  put: (path: string, value: unknown, label: string, typingAt?: string) => void;
  leaveField: () => void;
};

export const TripPartContext = createContext<TripPartDesk | null>(null);

export function useTripPart(): TripPartDesk {
  const desk = useContext(TripPartContext);
  if (!desk) throw new Error('Used outside the editor of a vehicle or route');
  return desk;
}
