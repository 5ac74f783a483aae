import { useCallback, useMemo } from 'react';
import { useSearchParams } from 'react-router-dom';
import { paramsOf, viewOf, type ListView } from '../model/list-view.ts';

/** @param isPassing  whether "back" skips the view that is left, as it should while somebody types */
export type ChangeView = (change: Partial<ListView>, isPassing?: boolean) => void;

/** The view in the address, and how to change it. */
export function useListView(): [ListView, ChangeView] {
  const [params, setParams] = useSearchParams();
  const view = useMemo(() => viewOf(params), [params]);
  const change = useCallback<ChangeView>(
    (part, isPassing = false) =>
      setParams((now) => paramsOf({ ...viewOf(now), ...part }), { replace: isPassing, preventScrollReset: true }),
    [setParams],
  );
  return [view, change];
}
