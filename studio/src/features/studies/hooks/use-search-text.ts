import { useEffect, useState } from 'react';

/** A pause between two words, for most who type. */
const PAUSE_MS = 250;

/**
 * What is typed into a search, told on after a pause.
 *
 * @param asked  what is searched for now; where somebody else changes it, such as "back", the text follows
 * @param ask    searches
 */
export function useSearchText(asked: string, ask: (text: string) => void): [string, (text: string) => void] {
  const [typed, setTyped] = useState(asked);
  const [told, setTold] = useState(asked);
  const [seen, setSeen] = useState(asked);
  if (asked !== seen) {
    setSeen(asked);
    // What was told from here comes back while more may have been typed.
    if (asked !== told) {
      setTyped(asked);
      setTold(asked);
    }
  }
  useEffect(() => {
    // The clock.
    if (typed === told) return;
    const timer = setTimeout(() => {
      setTold(typed);
      ask(typed);
    }, PAUSE_MS);
    return () => clearTimeout(timer);
  }, [typed, told, ask]);
  return [typed, setTyped];
}
