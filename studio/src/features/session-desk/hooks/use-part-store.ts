import { useCallback, useEffect, useRef, useState } from 'react';
import { carrierFor, type PartBody, type SessionPartKind } from '../model/carriers.ts';
import type { Example } from '../../../lib/examples.ts';
import { createPartStore, type PartEntry, type PartStore } from '../model/part-store.ts';

export type OpenedPart = {
  /** Null until the first example that carries the part is here. */
  store: PartStore | null;
  carrier: Example;
  /** Whether the example asked for last could not be fetched. */
  failed: boolean;
  /** Shows the part on another example, or tries the same once more. */
  carryOn: (example: Example) => void;
};

/** A part opened on the example that suits it; what is handed in later changes nothing. */
export function usePartStore(kind: SessionPartKind, initial: PartEntry, saved: PartBody | null): OpenedPart {
  const [first] = useState(() => ({ kind, initial, saved, carrier: carrierFor(kind, initial.body) }));
  const [wanted, setWanted] = useState({ example: first.carrier });
  const [shown, setShown] = useState<{ store: PartStore | null; carrier: Example; failed: boolean }>({
    store: null,
    carrier: first.carrier,
    failed: false,
  });
  const opened = useRef<PartStore | null>(null);
  // Fetches the file of the example that is wanted.
  useEffect(() => {
    let gone = false;
    const { example } = wanted;
    example.load().then(
      (base) => {
        if (gone) return;
        if (opened.current) opened.current.carryOn(base);
        else opened.current = createPartStore(first.kind, base, first.initial, first.saved);
        setShown({ store: opened.current, carrier: example, failed: false });
      },
      () => !gone && setShown((now) => ({ ...now, failed: true })),
    );
    return () => {
      gone = true;
    };
  }, [wanted, first]);
  const carryOn = useCallback((example: Example) => setWanted({ example }), []);
  return { ...shown, carryOn };
}
