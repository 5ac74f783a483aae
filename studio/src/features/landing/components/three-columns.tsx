import { LimitBand } from '../../../charts/limit-band.tsx';
import { useWidth } from '../../../charts/use-width.ts';
import type { SessionResult } from '@voltiplano/engine';
import { useRuns } from '../hooks/use-runs.ts';
import { baselinePair } from '../model/trial-study.ts';
import { BaselineOverlay } from './baseline-overlay.tsx';
import { CliffMap } from './cliff-map.tsx';

/** What the studio shows, each with a drawing of real runs. */
export function ThreeColumns() {
  const [lowered = null, asIs = null] = useRuns(baselinePair);
  return (
    <div className="cols">
      <section>
        <h2>Which limit, when</h2>
        <p>
          Eleven limits, one band. The deeper the bed, the nearer to the cell: station at the surface, vehicle below,
          cell at the bottom.
        </p>
        <div className="fg">
          <Band result={asIs} />
        </div>
      </section>
      <section>
        <h2>Where the cliff is</h2>
        <p>
          Station power over start temperature, dark is slow: the edge past which the minutes run away. 135 runs from 10
          to 80 %, made in your browser while you read.
        </p>
        <div className="fg">
          <CliffMap />
        </div>
      </section>
      <section>
        <h2>Keep a baseline</h2>
        <p>
          Keep any run in grey and change one thing. Here every ledge stands at 80 %: the difference is an amount and a
          word.
        </p>
        <div className="fg">
          <BaselineOverlay live={lowered} baseline={asIs} />
        </div>
      </section>
    </div>
  );
}

function Band({ result }: { result: SessionResult | null }) {
  const [ref, width] = useWidth<HTMLDivElement>();
  return <div ref={ref}>{result && width > 0 && <LimitBand result={result} width={width} />}</div>;
}
