import { useUnits } from '../../../lib/units.ts';
import { useAnswered } from '../hooks/run-context.ts';
import { heatWords } from '../model/heat-words.ts';

/** How fast the pack's thermal network is, and where it would settle. */
export function HeatSection() {
  const { thermal } = useAnswered().answer;
  const units = useUnits();
  return (
    <section className="heat" aria-labelledby="heat-title">
      <div className="bar">
        <h2 id="heat-title">Heat</h2>
      </div>
      {heatWords(thermal, units).map((sentence) => (
        <p key={sentence}>{sentence}</p>
      ))}
    </section>
  );
}
