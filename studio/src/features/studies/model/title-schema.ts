import { z } from 'zod';

/** Title of a new study; empty for the one that is offered. */
export const titleSchema = z.string().trim().max(300, 'At most 300 characters');
