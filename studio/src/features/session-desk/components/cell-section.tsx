import { sections } from '../model/input-sections.ts';
import { MoreFields } from './more-fields.tsx';
import { NameField } from './name-field.tsx';
import { OptionalPart } from './optional-part.tsx';
import { PotentialChoice } from './potential-choice.tsx';
import { QuantityField, QuantityFields } from './quantity-field.tsx';
import { SectionFrame } from './section-frame.tsx';
import { StudyTable } from './study-table.tsx';
import { TableChart } from './table-chart.tsx';

export function CellSection() {
  const { fields, more } = sections.cell;
  return (
    <SectionFrame name="cell">
      <QuantityFields fields={fields} />
      <MoreFields name="cell" fields={more} first={<NameField path="cell.name" label="Name" />} />
      <PotentialChoice part="ocv" label="Rest voltage" />
      <h4 className="part">RC pairs</h4>
      <StudyTable path="cell.rcPairs" />
      <AnodePart />
      <TablePart
        path="cell.resistanceShape"
        title="Resistance over z"
        noun="resistance table"
        without="The same resistance at every z."
      />
      <TablePart
        path="cell.entropicMvPerK"
        title="Entropic coefficient"
        noun="entropic table"
        article="an"
        without="No reversible heat."
      />
    </SectionFrame>
  );
}

/** The margin cannot be guarded without the anode, so it goes with it. */
const MARGIN_GOES = [{ path: 'strategy.anodeMarginMv', value: undefined }];

function AnodePart() {
  return (
    <OptionalPart
      path="cell.anode"
      noun="anode"
      article="an"
      without="Anode potential is not known."
      goWith={MARGIN_GOES}
    >
      <h4 className="part">Anode</h4>
      <PotentialChoice part="anode" label="Potential" />
      <QuantityField path="cell.anode.share" />
    </OptionalPart>
  );
}

type TablePartProps = {
  path: 'cell.resistanceShape' | 'cell.entropicMvPerK';
  title: string;
  noun: string;
  article?: 'a' | 'an';
  without: string;
};

function TablePart({ path, title, ...part }: TablePartProps) {
  return (
    <OptionalPart path={path} {...part}>
      <h4 className="part">{title}</h4>
      <StudyTable path={path} chart={(grid) => <TableChart path={path} grid={grid} />} />
    </OptionalPart>
  );
}
