import { useCallback, useRef } from 'react';

/** Idempotency keys: the same for the same wish, so that what is sent again is not done again. */
export function useWishKey(): (says: string) => string {
  const wish = useRef({ says: '', key: '' });
  return useCallback((says) => {
    if (wish.current.says !== says || wish.current.key === '') wish.current = { says, key: crypto.randomUUID() };
    return wish.current.key;
  }, []);
}
