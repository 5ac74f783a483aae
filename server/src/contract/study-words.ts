import { z } from 'zod';

/** What a study computes. */
export const studyKinds = ['session', 'trip', 'sweep', 'fit'] as const;
export const studyKindSchema = z.enum(studyKinds).meta({ id: 'StudyKind' });
export type StudyKind = z.infer<typeof studyKindSchema>;

/** How far a study has come: worked on, waiting for a reviewer, or released and frozen. */
export const studyStates = ['draft', 'in-review', 'released'] as const;
export const studyStateSchema = z.enum(studyStates).meta({ id: 'StudyState' });
export type StudyState = z.infer<typeof studyStateSchema>;
