import { studyEndpoints, type Study } from '../../../../../server/src/contract/study.ts';
import { callApi } from '../../../lib/api/call-api.ts';
import type { StudyPlace } from './study-query.ts';

/**
 * Makes a study of the caller's own from a revision, by default the newest.
 *
 * @param wish  the same for the same wish: asked for twice, the study is made once
 */
export function copyStudy(place: StudyPlace, wish: string, revision?: number): Promise<Study> {
  return callApi(studyEndpoints.copyStudy, {
    params: place,
    body: revision === undefined ? {} : { revision },
    idempotencyKey: wish,
  });
}
