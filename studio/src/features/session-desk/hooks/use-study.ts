import { useQuery } from '@tanstack/react-query';
import type { Study } from '../../../../../server/src/contract/study.ts';
import { studyQuery } from '../api/study-query.ts';
import { useStudyDesk } from './study-desk-context.ts';

/** The study as the server last told it. The page draws the desk only once it is here. */
export function useStudy(): Study {
  const { place } = useStudyDesk();
  const { data } = useQuery(studyQuery(place));
  if (!data) throw new Error('Used before the study was read');
  return data;
}
