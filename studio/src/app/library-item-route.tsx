import { LibraryItemPage } from '../features/library/library-item-page.tsx';
import { PartEditor } from '../features/session-desk/components/part-editor.tsx';

/** A part of the library with the desk's own inputs. */
export function LibraryItemRoute() {
  return <LibraryItemPage SessionPartEditor={PartEditor} />;
}
