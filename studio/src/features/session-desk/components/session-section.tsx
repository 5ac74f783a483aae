import { sections } from '../model/input-sections.ts';
import { MoreFields } from './more-fields.tsx';
import { QuantityFields } from './quantity-field.tsx';
import { SectionFrame } from './section-frame.tsx';

export function SessionSection() {
  const { fields, more } = sections.session;
  return (
    <SectionFrame name="session">
      <QuantityFields fields={fields} />
      <MoreFields name="session" fields={more} />
    </SectionFrame>
  );
}
