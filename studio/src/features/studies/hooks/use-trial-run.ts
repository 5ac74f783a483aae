import type { SessionStudyInput } from '@voltiplano/engine';
import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { sessionClient } from '../../../lib/session-client.ts';

/** The engine's run of a session that is not kept yet. @param inputs  null where there is nothing to run */
export function useTrialRun(inputs: SessionStudyInput | null) {
  return useQuery({
    queryKey: ['trial-run', inputs],
    queryFn: () => sessionClient().run(inputs!).result,
    enabled: inputs !== null,
    staleTime: Infinity,
    retry: false,
    placeholderData: keepPreviousData,
  });
}
