import { sections } from '../model/input-sections.ts';
import { MoreFields } from './more-fields.tsx';
import { NameField } from './name-field.tsx';
import { OptionalPart } from './optional-part.tsx';
import { QuantityFields } from './quantity-field.tsx';
import { SectionFrame } from './section-frame.tsx';

export function InletSection() {
  const { fields, more } = sections.inlet;
  return (
    <SectionFrame name="inlet">
      <OptionalPart path="inlet" noun="inlet" article="an" without="No inlet: no losses, no limit of its own.">
        <QuantityFields fields={fields} />
        <MoreFields name="inlet" fields={more} />
      </OptionalPart>
    </SectionFrame>
  );
}

export function BoostSection() {
  return (
    <SectionFrame name="boost">
      <OptionalPart path="boost" noun="boost converter" without="No converter for stations below the pack’s voltage.">
        <QuantityFields fields={sections.boost.fields} />
      </OptionalPart>
    </SectionFrame>
  );
}

export function PackSection() {
  const { fields, more } = sections.pack;
  return (
    <SectionFrame name="pack">
      <QuantityFields fields={fields} />
      <MoreFields name="pack" fields={more} first={<NameField path="pack.name" label="Name" />} />
    </SectionFrame>
  );
}
