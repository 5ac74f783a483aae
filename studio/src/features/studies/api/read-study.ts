import { studyEndpoints } from '../../../../../server/src/contract/study.ts';
import { callApi } from '../../../lib/api/call-api.ts';

/** A study, whole, as it is now. */
export function readStudy(workspaceId: string, studyId: string) {
  return callApi(studyEndpoints.readStudy, { params: { workspaceId, studyId } });
}
