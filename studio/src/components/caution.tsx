import { CAUTION, CAUTION_SHORT } from './caution-text.ts';

type Props = {
  short?: boolean;
  /** True where the pack, station or people on the page are made up. */
  invented?: boolean;
};

/** What a simulation is not; in sight wherever results are. */
export function Caution({ short, invented }: Props) {
  return (
    <p className="caution">
      {short ? CAUTION_SHORT : CAUTION}
      {invented && ' Vicuña, Suri, Salar and every number of theirs are invented.'}
    </p>
  );
}
