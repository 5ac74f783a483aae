import { Menu, MenuChoice } from '../components/menu.tsx';
import { daylights, setDaylight, useDaylight } from '../lib/daylight.ts';
import { setUnits, useUnits } from '../lib/units.ts';

const daylightWords = { system: 'as the system', day: 'day', night: 'night' } as const;

/** Day or night, degrees and distances: how this browser shows everything. */
export function DisplayMenu() {
  return (
    <Menu trigger={<button className="lnk">Display</button>} align="end">
      <DisplayChoices />
    </Menu>
  );
}

/** The same choices, as part of another menu. */
export function DisplayChoices() {
  const daylight = useDaylight();
  const { system } = useUnits();
  return (
    <>
      <MenuChoice
        heading="Light"
        value={daylight}
        options={daylights.map((value) => ({ value, label: daylightWords[value] }))}
        onChange={setDaylight}
      />
      <MenuChoice
        heading="Temperatures"
        value={system.temperature}
        options={[{ value: '°C' as const }, { value: '°F' as const }]}
        onChange={(temperature) => setUnits({ temperature })}
      />
      <MenuChoice
        heading="Distances"
        value={system.distance}
        options={[{ value: 'km' as const }, { value: 'mi' as const }]}
        onChange={(distance) => setUnits({ distance })}
      />
    </>
  );
}
