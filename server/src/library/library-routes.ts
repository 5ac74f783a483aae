import type { Response } from 'express';
import { libraryEndpoints as library, type LibraryItem } from '../contract/library.ts';
import type { Api } from '../http/api.ts';
import { etagOf } from '../http/if-match.ts';
import { exportItems, importItems } from './library-file.ts';
import { listItems } from './library-list.ts';
import { getItem } from './library-repository.ts';
import { archiveItem, createItem, restoreRevision, reviseItem } from './library-service.ts';
import { listUse } from './library-use.ts';
import { getRevision, listRevisions } from './revision-repository.ts';

/** The parts that studies are put together from, and their revisions. */
export function libraryRoutes(api: Api): void {
  api.serve(library.listLibrary, ({ core, access, query }) => listItems(core, access, query));
  api.serve(library.createLibraryItem, async ({ core, access, body, res }) =>
    tagged(res, await createItem(core, access, body)),
  );
  api.serve(library.readLibraryItem, async ({ core, access, params, res }) =>
    tagged(res, await getItem(core, access, params.itemId)),
  );
  api.serve(library.reviseLibraryItem, async ({ core, access, params, ifMatch, body, res }) =>
    tagged(res, await reviseItem(core, access, { ...params, ifMatch }, body)),
  );
  api.serve(library.restoreLibraryRevision, async ({ core, access, params, ifMatch, res }) =>
    tagged(res, await restoreRevision(core, access, { ...params, ifMatch })),
  );
  api.serve(library.archiveLibraryItem, async ({ core, access, params, res }) =>
    tagged(res, await archiveItem(core, access, params.itemId, true)),
  );
  api.serve(library.unarchiveLibraryItem, async ({ core, access, params, res }) =>
    tagged(res, await archiveItem(core, access, params.itemId, false)),
  );
  api.serve(library.listLibraryRevisions, ({ core, access, params, query }) =>
    listRevisions(core, access, params.itemId, query),
  );
  api.serve(library.readLibraryRevision, ({ core, access, params }) =>
    getRevision(core, access, params.itemId, params.revision),
  );
  api.serve(library.listLibraryUse, ({ core, access, params, query }) => listUse(core, access, params.itemId, query));
  api.serve(library.exportLibrary, ({ core, access, query }) => exportItems(core, access, query));
  api.serve(library.importLibrary, ({ core, access, body }) => importItems(core, access, body));
}

/** The answer with the ETag that the next change is made from. */
function tagged(res: Response, item: LibraryItem): LibraryItem {
  res.set('ETag', etagOf('r', item.revision));
  return item;
}
