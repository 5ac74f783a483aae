import { z } from 'zod';

export const healthSchema = z
  .object({
    status: z.literal('ok'),
    version: z.string().meta({ description: 'Version of the server' }),
    uptimeS: z.number().meta({ description: 'Time since the start [s]' }),
  })
  .meta({ id: 'Health' });
export type Health = z.infer<typeof healthSchema>;

export const readinessSchema = z.object({ status: z.literal('ready') }).meta({ id: 'Readiness' });
export type Readiness = z.infer<typeof readinessSchema>;
