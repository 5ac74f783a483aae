import type { Response } from 'express';
import { type Study, studyEndpoints } from '../contract/study.ts';
import type { Api } from '../http/api.ts';
import { etagOf } from '../http/if-match.ts';
import { listRevisions } from './revision-repository.ts';
import { prepareRevision, readRevision, saveRevision } from './revision-service.ts';
import { readStudy } from './study-answer.ts';
import { listStudies } from './study-list.ts';
import { getStudy } from './study-repository.ts';
import { copyStudy, createStudy, moveStudy, prepareCopy, prepareStudy } from './study-service.ts';
import { writeWorkingCopy } from './working-copy-service.ts';

/** Studies, their working copies and their revisions. */
export function studyRoutes(api: Api): void {
  api.serve(studyEndpoints.listStudies, ({ core, access, query }) => listStudies(core, access, query));
  api.serve(studyEndpoints.createStudy, {
    prepare: ({ core, access, body }) => prepareStudy(core, access, body),
    handle: async ({ core, access, body, res }, headline) =>
      tagged(res, await createStudy(core, access, body, headline)),
  });
  api.serve(studyEndpoints.readStudy, async ({ core, access, params, res }) =>
    tagged(res, await readStudy(core, access, params.studyId)),
  );
  api.serve(studyEndpoints.copyStudy, {
    prepare: ({ core, access, params, body }) => prepareCopy(core, access, params.studyId, body),
    handle: async ({ core, access, res }, copy) => tagged(res, await copyStudy(core, access, copy)),
  });
  api.serve(studyEndpoints.archiveStudy, async ({ core, access, params, res }) =>
    tagged(res, await moveStudy(core, access, params.studyId, 'archive')),
  );
  api.serve(studyEndpoints.unarchiveStudy, async ({ core, access, params, res }) =>
    tagged(res, await moveStudy(core, access, params.studyId, 'use')),
  );
  workingRoutes(api);
  revisionRoutes(api);
}

function workingRoutes(api: Api): void {
  api.serve(studyEndpoints.writeWorkingCopy, async ({ core, access, params, body, ifMatch, res }) => {
    const working = await writeWorkingCopy(core, access, params.studyId, body, ifMatch);
    res.set('ETag', etagOf('w', working.version));
    return working;
  });
}

function revisionRoutes(api: Api): void {
  api.serve(studyEndpoints.saveRevision, {
    prepare: ({ core, access, params, ifMatch }) => prepareRevision(core, access, params.studyId, ifMatch),
    handle: async ({ core, access, params, body, ifMatch, res }, headline) =>
      tagged(res, await saveRevision(core, access, params.studyId, { ifMatch, message: body.message, headline })),
  });
  api.serve(studyEndpoints.listStudyRevisions, async ({ core, access, params, query }) => {
    await getStudy(core, access, params.studyId);
    return listRevisions(core, access, params.studyId, query);
  });
  api.serve(studyEndpoints.readStudyRevision, ({ core, access, params }) =>
    readRevision(core, access, params.studyId, params.revision),
  );
}

/** The ETag of a study is that of its working copy. */
function tagged(res: Response, study: Study): Study {
  res.set('ETag', etagOf('w', study.working.version));
  return study;
}
