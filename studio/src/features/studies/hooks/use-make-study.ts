import { useRef } from 'react';
import { useNavigate } from 'react-router-dom';
import { useWorkspace } from '../../../lib/session/use-workspace.ts';
import { useCreateStudy, type NewStudy } from '../api/create-study.ts';

export type MakeStudy = (study: Omit<NewStudy, 'key'>) => Promise<void>;

/** Makes a study and opens its desk. @throws what the server says against it */
export function useMakeStudy(): MakeStudy {
  const { workspaceId } = useWorkspace();
  const { mutateAsync: create } = useCreateStudy(workspaceId);
  const navigate = useNavigate();
  const wish = useRef({ text: '', key: '' });
  return async (study) => {
    const text = JSON.stringify(study);
    // The same study asked for again, after an answer that was lost, is the same wish.
    if (wish.current.text !== text) wish.current = { text, key: crypto.randomUUID() };
    const { id } = await create({ ...study, key: wish.current.key });
    await navigate(`/w/${workspaceId}/studies/${id}`);
  };
}
