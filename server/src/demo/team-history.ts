import { insertPerson } from '../account/people-repository.ts';
import { recordDeed } from '../activity/activity-repository.ts';
import { newSecret } from '../db/secret-tokens.ts';
import { insertInvitation } from '../workspaces/invitation-repository.ts';
import { joinByInvitation } from '../workspaces/invitation-service.ts';
import { insertWorkspace } from '../workspaces/workspace-repository.ts';
import { changeRole } from '../workspaces/workspace-service.ts';
import { accessOf, type DemoAct, type DemoScene, known } from './demo-scene.ts';
import { type DemoPerson, founder, invited, promotions, WORKSPACE_NAME } from './people.ts';

/** How the team came together. */
export function teamHistory(): DemoAct[] {
  return [
    { when: founder.when, act: begin },
    ...(Object.keys(invited) as (keyof typeof invited)[]).flatMap(comeIn),
    ...promotions.map(({ who, to, when }): DemoAct => ({
      when,
      act: async (scene) => changeRole(scene.core, await accessOf(scene, 'ines'), known(scene.people, who), to),
    })),
  ];
}

async function begin(scene: DemoScene): Promise<void> {
  const personId = await addPerson(scene, 'ines', founder);
  const workspace = await insertWorkspace(scene.core, personId, WORKSPACE_NAME);
  scene.workspaceId = workspace.id;
}

/** An invitation and what came of it. No mail goes out: the addresses are invented. */
function comeIn(person: keyof typeof invited): DemoAct[] {
  const { email, role, invited: sent, joined } = invited[person];
  const token = newSecret();
  const invite = async (scene: DemoScene) => {
    const access = await accessOf(scene, 'ines');
    const { id } = await insertInvitation(scene.core, access, { email, role, token });
    const { workspaceId, actor } = access;
    const deed = { workspaceId, personId: actor.personId, subjectId: id, detail: { email, role } };
    await recordDeed(scene.core, { ...deed, action: 'invitation.sent' });
  };
  const join = (scene: DemoScene) =>
    joinByInvitation(scene.core, token, () => addPerson(scene, person, invited[person]));
  return [
    { when: sent, act: invite },
    { when: joined, act: join },
  ];
}

async function addPerson(
  { core, people, passwordHashes }: DemoScene,
  person: DemoPerson,
  { email, name }: { email: string; name: string },
): Promise<string> {
  const id = await insertPerson(core, { email, name, passwordHash: passwordHashes[person], isEmailProven: true });
  people.set(person, id);
  return id;
}
