import { studyEndpoints, type Study } from '../../../../../server/src/contract/study.ts';
import { callApi } from '../../../lib/api/call-api.ts';
import type { Content } from '../model/working-content.ts';

/**
 * Makes a study of what is on a desk.
 *
 * @param wish  the same for the same wish: asked for twice, the study is made once
 */
export function createStudy(workspaceId: string, content: Content, message: string, wish: string): Promise<Study> {
  const { draft, references } = content;
  return callApi(studyEndpoints.createStudy, {
    params: { workspaceId },
    body: { inputs: draft.study, parts: [...references], message },
    idempotencyKey: wish,
  });
}
