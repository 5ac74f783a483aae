import { useState } from 'react';
import type { QuantityPath } from '@voltiplano/engine';
import { ChoiceField } from '../../../components/fields/choice-field.tsx';
import { useReadOnly } from '../../../components/fields/read-only.ts';
import { TextField } from '../../../components/fields/text-field.tsx';
import { useWholeLibrary } from '../api/read-whole-library.ts';
import { useTripPart } from '../hooks/trip-part-context.ts';
import type { TypedLeg } from '../model/route-rows.ts';
import { DepartFields } from './depart-fields.tsx';
import { PartField } from './part-field.tsx';

type Props = { index: number; leg: TypedLeg; workspaceId: string };

const NONE = 'none';
const HERE = 'here';

/** What stands at the end of a leg: a station, from the library or of one's own, and when to leave it. */
export function LegEnd({ index, leg, workspaceId }: Props) {
  const { station, depart: _rule, ...driven } = leg;
  const { put } = useTripPart();
  const readOnly = useReadOnly();
  const library = useWholeLibrary(workspaceId, { kind: 'station', enabled: !readOnly });
  const [isOpen, setOpen] = useState(false);
  const path = `trip.legs[${index}]`;
  const name = typeof station?.name === 'string' ? station.name : '';
  const choose = (value: string) => {
    const chosen = library.data?.find(({ id }) => id === value);
    if (chosen) put(`${path}.station`, chosen.body, 'station');
    // A rule for leaving needs a station to leave.
    else if (value === NONE) put(path, driven, 'no station');
  };
  return (
    <li>
      <ChoiceField
        label={`After leg ${index + 1}`}
        value={station ? HERE : NONE}
        options={[
          { value: NONE, label: 'No station' },
          ...(station ? [{ value: HERE, label: name || 'A station without a name' }] : []),
          ...(library.data ?? []).map((item) => ({ value: item.id, label: `${item.name}, of the library` })),
        ]}
        onChange={choose}
      />
      {station && (
        <>
          <DepartFields path={`${path}.depart`} />
          <button type="button" className="lnk" aria-expanded={isOpen} onClick={() => setOpen(!isOpen)}>
            {isOpen ? 'Hide the station' : 'Show the station'}
          </button>
          {isOpen && <StationFields path={`${path}.station`} name={name} />}
        </>
      )}
    </li>
  );
}

const STATION: QuantityPath[] = [
  'station.powerMaxKw',
  'station.currentMaxA',
  'station.voltageMinV',
  'station.voltageMaxV',
  'station.rampAPerS',
  'station.rectifierEfficiency',
];

function StationFields({ path, name }: { path: string; name: string }) {
  const { put, leaveField } = useTripPart();
  return (
    <div className="leg-station">
      <TextField
        label="Name"
        value={name}
        onText={(text) => put(`${path}.name`, text, 'station’s name', `${path}.name`)}
        onLeave={leaveField}
      />
      {STATION.map((quantity) => (
        <PartField key={quantity} path={`${path}.${quantity.slice('station.'.length)}`} quantity={quantity} />
      ))}
    </div>
  );
}
