import { studyEndpoints, type WorkingCopy } from '../../../../../server/src/contract/study.ts';
import { callApi } from '../../../lib/api/call-api.ts';
import { contentBody, type Content } from '../model/working-content.ts';
import type { StudyPlace } from './study-query.ts';

/** Browsers let calls of up to 64 KiB in all outlive their page; this leaves room for others. */
const KEEPALIVE_MAX_CHARS = 24_000;

/** Writes the working copy over the version it was made from. */
export function writeWorkingCopy(place: StudyPlace, content: Content, version: number): Promise<WorkingCopy> {
  const body = contentBody(content);
  return callApi(studyEndpoints.writeWorkingCopy, {
    params: place,
    body,
    ifMatch: workingTag(version),
    keepalive: JSON.stringify(body).length <= KEEPALIVE_MAX_CHARS,
  });
}

/** ETag of a version of the working copy. */
export function workingTag(version: number): string {
  return `"w${version}"`;
}
