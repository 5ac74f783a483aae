import { studyEndpoints, type Study } from '../../../../../server/src/contract/study.ts';
import { callApi } from '../../../lib/api/call-api.ts';
import type { StudyPlace } from './study-query.ts';

/** Puts a study into the archive, where it can be read and not changed. */
export function archiveStudy(place: StudyPlace): Promise<Study> {
  return callApi(studyEndpoints.archiveStudy, { params: place });
}

export function unarchiveStudy(place: StudyPlace): Promise<Study> {
  return callApi(studyEndpoints.unarchiveStudy, { params: place });
}
