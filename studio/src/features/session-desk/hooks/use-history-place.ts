import { useSearchParams } from 'react-router-dom';

/** What the address says of the history: whether it is open, the revision looked at, and what it is compared with. */
export function useHistoryPlace() {
  const [search, setSearch] = useSearchParams();
  const revision = numberIn(search, 'revision');
  const set = (change: (next: URLSearchParams) => void) =>
    setSearch(
      (before) => {
        const next = new URLSearchParams(before);
        change(next);
        return next;
      },
      { preventScrollReset: true },
    );
  return {
    isOpen: search.has('history') || revision !== null,
    revision,
    against: search.get('against') === 'now' ? ('now' as const) : numberIn(search, 'against'),
    open: () => set((next) => next.set('history', '')),
    close: () => set((next) => ['history', 'revision', 'against'].forEach((name) => next.delete(name))),
    look: (at: number, against?: number | 'now') =>
      set((next) => {
        next.delete('history');
        next.set('revision', String(at));
        if (against === undefined) next.delete('against');
        else next.set('against', String(against));
      }),
  };
}

function numberIn(search: URLSearchParams, name: string): number | null {
  const value = Number(search.get(name));
  return Number.isInteger(value) && value > 0 ? value : null;
}
