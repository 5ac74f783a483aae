import { saveFile } from '../../../charts/chart-export.ts';
import { toast } from '../../../components/toasts.tsx';
import { problemSentence } from '../../../lib/api/api-problem.ts';
import { readLibraryFile } from '../api/export-library.ts';

type Wanted = Parameters<typeof readLibraryFile>[1];

/** Fetches parts as a file and hands it to the browser to keep; says what went wrong where that fails. */
export async function saveLibraryFile(workspaceId: string, wanted: Wanted, name: string): Promise<void> {
  try {
    const file = await readLibraryFile(workspaceId, wanted);
    if (file.items.length === 0) return toast('Nothing to export: there is no such part outside the archive.');
    const text = `${JSON.stringify(file, null, 2)}\n`;
    saveFile(new Blob([text], { type: 'application/json' }), `${fileName(name)}.json`);
  } catch (error) {
    toast(`Not exported. ${problemSentence(error)}`, { kind: 'stop' });
  }
}

/** A name without what file systems refuse. */
function fileName(name: string): string {
  return name.replace(/[\\/:*?"<>|\s]+/g, '-').replace(/^-+|-+$/g, '') || 'library';
}
