import { TableChart } from './table-chart.tsx';
import { sections } from '../model/input-sections.ts';
import { HeldNote } from './held-note.tsx';
import { OptionalPart } from './optional-part.tsx';
import { QuantityFields } from './quantity-field.tsx';
import { SectionFrame } from './section-frame.tsx';
import { StudyTable } from './study-table.tsx';

export function GuardsSection() {
  return (
    <SectionFrame name="guards">
      <QuantityFields fields={sections.guards.fields} />
      <p className="note">The hot limit reads surfaces: cores may pass its upper end.</p>
      <OptionalPart path="strategy.coldLimit" noun="cold limit" without="No cold limit.">
        <h4 className="part">Cold limit</h4>
        <div className="note">
          <HeldNote code="cold" />
        </div>
        <StudyTable path="strategy.coldLimit" chart={(grid) => <TableChart path="strategy.coldLimit" grid={grid} />} />
      </OptionalPart>
    </SectionFrame>
  );
}
