import type { SessionPartKind } from '../model/carriers.ts';
import { sections } from '../model/input-sections.ts';
import { CellSection } from './cell-section.tsx';
import { CoolingSection } from './cooling-section.tsx';
import { GuardsSection } from './guards-section.tsx';
import { QuantityFields } from './quantity-field.tsx';
import { SectionFrame } from './section-frame.tsx';
import { StationSection } from './station-section.tsx';
import { TaperSection } from './taper-section.tsx';
import { PackSection } from './vehicle-sections.tsx';

/** The desk's sections that describe one part. */
export function PartSections({ kind }: { kind: SessionPartKind }) {
  switch (kind) {
    case 'cell':
      return <CellSection />;
    case 'pack':
      return <PackSection />;
    case 'thermal':
      return <CoolingSection />;
    case 'inlet':
      return <InletAlone />;
    case 'station':
      return <StationSection />;
    case 'strategy':
      return (
        <>
          <TaperSection />
          <GuardsSection />
        </>
      );
  }
}

/** An inlet that is the whole part cannot be left out, as a study can leave it out. */
function InletAlone() {
  const { fields, more } = sections.inlet;
  return (
    <SectionFrame name="inlet">
      <QuantityFields fields={[...fields, ...more]} />
    </SectionFrame>
  );
}
