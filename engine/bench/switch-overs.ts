import { simulateSession, type SessionStudy } from '../src/index.ts';

/** Evaluations of a run that stops where one limit hands over to another, and of one whose steps run across. */
export type SwitchOvers = { name: string; stopping: number; across: number };

export function compareSwitchOvers(studies: [string, SessionStudy][]): SwitchOvers[] {
  const evaluations = (study: SessionStudy, stopAtSwitchOvers: boolean) =>
    simulateSession(study, { stopAtSwitchOvers }).statistics.evaluations;
  return studies.map(([name, study]) => ({
    name,
    stopping: evaluations(study, true),
    across: evaluations(study, false),
  }));
}
