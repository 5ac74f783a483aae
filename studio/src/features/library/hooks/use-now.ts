import { useEffect, useState } from 'react';

const EVERY_MS = 30_000;

/** The reader's clock [ms], fresh enough for "12 min ago". */
export function useNow(): number {
  const [now, setNow] = useState(() => Date.now());
  // The clock.
  useEffect(() => {
    const timer = setInterval(() => setNow(Date.now()), EVERY_MS);
    return () => clearInterval(timer);
  }, []);
  return now;
}
