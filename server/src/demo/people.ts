import type { Role } from '../contract/roles.ts';
import type { DemoMoment } from './moment.ts';

export const WORKSPACE_NAME = 'Puna Mobility';

/** One plain password for all four: it is printed, and guards nothing. */
export const DEMO_PASSWORD = 'puna-demo-2026';

/** The owner, who begins the workspace and invites the others. */
export const founder = { email: 'ines@puna.example', name: 'Inés Quispe', when: '62d 09:10' } as const satisfies {
  email: string;
  name: string;
  when: DemoMoment;
};

type Invited = { email: string; name: string; role: Role; invited: DemoMoment; joined: DemoMoment };

/** Members that the owner invited, with the role that they were invited as. */
export const invited = {
  rosa: { email: 'rosa@puna.example', name: 'Rosa Mamani', role: 'analyst', invited: '62d 09:25', joined: '61d 08:50' },
  mateo: {
    email: 'mateo@puna.example',
    name: 'Mateo Condori',
    role: 'analyst',
    invited: '49d 16:30',
    joined: '48d 09:05',
  },
  tomas: {
    email: 'tomas@puna.example',
    name: 'Tomás Apaza',
    role: 'viewer',
    invited: '35d 11:00',
    joined: '35d 14:20',
  },
} as const satisfies Record<string, Invited>;

/** What became of a role later. */
export const promotions: { who: DemoPerson; to: Role; when: DemoMoment }[] = [
  { who: 'rosa', to: 'engineer', when: '60d 17:05' },
];

export type DemoPerson = 'ines' | keyof typeof invited;

/** Addresses that an account of the demo may have, in the order in which they are printed. */
export const demoEmails = [founder.email, ...Object.values(invited).map(({ email }) => email)];
