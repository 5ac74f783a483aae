import { createContext, useContext } from 'react';

/** Whether the fields below may only be read: their values can be reached and copied, and nothing offers to change them. */
export const ReadOnlyFields = createContext(false);

export function useReadOnly(): boolean {
  return useContext(ReadOnlyFields);
}
