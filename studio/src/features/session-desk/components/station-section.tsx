import { sections } from '../model/input-sections.ts';
import { MoreFields } from './more-fields.tsx';
import { NameField } from './name-field.tsx';
import { OptionalPart } from './optional-part.tsx';
import { QuantityFields } from './quantity-field.tsx';
import { SectionFrame } from './section-frame.tsx';
import { StudyTable } from './study-table.tsx';
import { TableChart } from './table-chart.tsx';

export function StationSection() {
  const { fields, more } = sections.station;
  return (
    <SectionFrame name="station">
      <QuantityFields fields={fields} />
      <OptionalPart path="station.powerSteps" noun="power sharing" article="" without="Power is not shared.">
        <h4 className="part">Power sharing</h4>
        <StudyTable path="station.powerSteps" chart={(grid) => <TableChart path="station.powerSteps" grid={grid} />} />
      </OptionalPart>
      <MoreFields name="station" fields={more} first={<NameField path="station.name" label="Name" />} />
    </SectionFrame>
  );
}
