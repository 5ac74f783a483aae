import { studyEndpoints, type Study } from '../../../../../server/src/contract/study.ts';
import { callApi } from '../../../lib/api/call-api.ts';
import type { StudyPlace } from './study-query.ts';
import { workingTag } from './write-working-copy.ts';

/** What a person says of a revision. */
export const revisionMessage = studyEndpoints.saveRevision.body;

/** Makes the working copy, at a version, a revision. The same key makes it once, however often it is sent. */
export function saveRevision(place: StudyPlace, message: string, version: number, key: string): Promise<Study> {
  return callApi(studyEndpoints.saveRevision, {
    params: place,
    body: { message },
    ifMatch: workingTag(version),
    idempotencyKey: key,
  });
}
