import { useMemo } from 'react';

/** The same object for as long as its numbers stay the same, so that what is drawn from them is not drawn again. */
export function useSteady<T extends readonly (number | readonly number[])[]>(numbers: T): T {
  const text = JSON.stringify(numbers);
  return useMemo(() => JSON.parse(text) as T, [text]);
}
