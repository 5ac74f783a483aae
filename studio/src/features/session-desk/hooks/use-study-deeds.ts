import { useQueryClient } from '@tanstack/react-query';
import { useNavigate } from 'react-router-dom';
import { toast } from '../../../components/toasts.tsx';
import { problemSentence } from '../../../lib/api/api-problem.ts';
import { archiveStudy, unarchiveStudy } from '../api/archive-study.ts';
import { copyStudy } from '../api/copy-study.ts';
import { setStudy, type StudyPlace } from '../api/study-query.ts';

/** What can be done with a study as a whole. */
export function useStudyDeeds(place: StudyPlace) {
  const client = useQueryClient();
  const navigate = useNavigate();
  return {
    /** Opens a study of the person's own, made from a revision. */
    copy: async (revision?: number) => {
      try {
        const { id, title } = await copyStudy(place, crypto.randomUUID(), revision);
        toast(`Copied. This is “${title}”`);
        await navigate(`/w/${place.workspaceId}/studies/${id}`);
      } catch (error) {
        toast(`Not copied. ${problemSentence(error)}`, { kind: 'stop' });
      }
    },
    /** @throws where the server refuses */
    archive: async () => {
      await setStudy(client, place, await archiveStudy(place));
      toast('In the archive');
    },
    unarchive: async () => {
      try {
        await setStudy(client, place, await unarchiveStudy(place));
        toast('Out of the archive');
      } catch (error) {
        toast(`Still in the archive. ${problemSentence(error)}`, { kind: 'stop' });
      }
    },
    copyLink: async () => {
      try {
        await navigator.clipboard.writeText(
          `${window.location.origin}/w/${place.workspaceId}/studies/${place.studyId}`,
        );
        toast('Link copied. It opens for members of this workspace');
      } catch {
        toast('Not copied: this browser refuses the clipboard', { kind: 'stop' });
      }
    },
  };
}
