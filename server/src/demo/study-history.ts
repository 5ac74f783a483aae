import type { PartReference, Study } from '../contract/study.ts';
import { etagOf } from '../http/if-match.ts';
import { prepareRevision, saveRevision } from '../studies/revision-service.ts';
import { createStudy, moveStudy, prepareStudy } from '../studies/study-service.ts';
import { writeWorkingCopy } from '../studies/working-copy-service.ts';
import { accessOf, type DemoAct, type DemoScene, known } from './demo-scene.ts';
import { demoStudies } from './demo-studies.ts';
import { composeStudy, type DemoChange, type DemoStudy, type DemoStudyRevision } from './demo-study.ts';
import type { DemoDeed } from './demo-item.ts';

/** How the studies were worked. */
export function studyHistory(): DemoAct[] {
  return demoStudies.flatMap(oneStudy);
}

function oneStudy({ revisions, unsaved, archived }: DemoStudy): DemoAct[] {
  const made: { study: Study | null } = { study: null };
  const current = () => {
    if (!made.study) throw new Error('A study of the demo is changed before it is made.');
    return made.study;
  };
  const [first, ...later] = revisions;
  const acts: DemoAct[] = [{ when: first.when, act: async (scene) => (made.study = await begin(scene, first)) }];
  later.forEach((revision, i) => {
    const changes = revisions.slice(0, i + 2);
    acts.push({
      when: revision.when,
      act: async (scene) => (made.study = await revise(scene, current(), changes, revision)),
    });
  });
  if (unsaved) {
    acts.push({ when: unsaved.when, act: (scene) => write(scene, current(), [...revisions, unsaved], unsaved) });
  }
  if (archived) {
    const putAway = async (scene: DemoScene) =>
      moveStudy(scene.core, await accessOf(scene, archived.by), current().id, 'archive');
    acts.push({ when: archived.when, act: putAway });
  }
  return acts;
}

async function begin(scene: DemoScene, revision: DemoStudyRevision): Promise<Study> {
  const access = await accessOf(scene, revision.by);
  const beginning = { ...contentOf(scene, [revision]), message: revision.message };
  return createStudy(scene.core, access, beginning, await prepareStudy(scene.core, access, beginning));
}

async function revise(
  scene: DemoScene,
  study: Study,
  changes: readonly DemoChange[],
  { by, message }: DemoStudyRevision,
): Promise<Study> {
  const { core } = scene;
  const access = await accessOf(scene, by);
  const ifMatch = etagOf('w', (await write(scene, study, changes, { by })).version);
  const headline = await prepareRevision(core, access, study.id, ifMatch);
  return saveRevision(core, access, study.id, { ifMatch, message, headline });
}

async function write(
  scene: DemoScene,
  { id, working }: Study,
  changes: readonly DemoChange[],
  { by }: Pick<DemoDeed, 'by'>,
) {
  const content = { ...contentOf(scene, changes), pending: {} };
  return writeWorkingCopy(scene.core, await accessOf(scene, by), id, content, etagOf('w', working.version));
}

function contentOf({ items }: DemoScene, changes: readonly DemoChange[]) {
  const { inputs, parts } = composeStudy(changes);
  const references = parts.map(({ part, item, revision }): PartReference => ({
    part,
    itemId: known(items, item),
    revision,
    keptAgainst: null,
  }));
  return { inputs, parts: references };
}
