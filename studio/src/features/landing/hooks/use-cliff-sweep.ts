import { useEffect, useState } from 'react';
import { makeSessionClient } from '../../../lib/session-client.ts';
import { cliffColumn, cliffTempsC } from '../model/cliff-sweep.ts';

/** Minutes 10–80 % of one cell: null where not reached, undefined where not run yet or failed. */
export type CliffCell = number | null | undefined;

/** Runs the small map in the background, column by column; columns not run yet are empty. */
export function useCliffSweep(): CliffCell[][] {
  const [columns, setColumns] = useState<CliffCell[][]>(() => cliffTempsC.map(() => []));
  // Speaks to workers of its own, so that the rulers above never wait for the map.
  useEffect(() => {
    const client = makeSessionClient(1);
    cliffTempsC.forEach((tempC, i) => {
      client.summarise(cliffColumn(tempC)).result.then(
        (cells) => {
          const minutes = cells.map((cell) => (cell instanceof Error ? undefined : cell.metrics.minutes10To80));
          setColumns((last) => last.map((column, k) => (k === i ? minutes : column)));
          if (i === cliffTempsC.length - 1) client.close();
        },
        // Cancelled when the page is left; a broken worker leaves its cells as dots.
        () => undefined,
      );
    });
    return () => client.close();
  }, []);
  return columns;
}
