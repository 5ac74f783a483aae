import { coolingParts, sections } from '../model/input-sections.ts';
import { MoreFields } from './more-fields.tsx';
import { OptionalPart } from './optional-part.tsx';
import { QuantityFields } from './quantity-field.tsx';
import { SectionFrame } from './section-frame.tsx';

export function CoolingSection() {
  const { fields, more } = sections.cooling;
  return (
    <SectionFrame name="cooling">
      <QuantityFields fields={fields} />
      <MoreFields name="cooling" fields={more} />
      {coolingParts.map((part) => (
        <OptionalPart key={part.key} path={`thermal.${part.key}`} noun={part.key} without={`No ${part.key}.`}>
          <h4 className="part">{part.title}</h4>
          <QuantityFields fields={part.fields} />
          <MoreFields name={part.key} fields={part.more} />
        </OptionalPart>
      ))}
    </SectionFrame>
  );
}
