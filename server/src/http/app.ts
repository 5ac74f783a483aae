import compression from 'compression';
import express, { type Express } from 'express';
import type { Logger } from 'pino';
import { healthRoutes } from '../health/health-routes.ts';
import { answerProblem, notFound } from './problem.ts';
import { requestLog } from './request-log.ts';
import { securityHeaders } from './security-headers.ts';
import { studioFiles } from './studio-files.ts';

export type AppDeps = {
  /** Absolute path of the built studio. */
  studioDir: string;
  version: string;
  logger: Logger;
  /** Clock [ms] that never runs backwards. */
  nowMs: () => number;
};

/** Makes the application. It never listens: `main.ts` and tests do. */
export function createApp({ studioDir, version, logger, nowMs }: AppDeps): Express {
  const app = express();
  app.use(requestLog(logger), securityHeaders(), compression());
  app.use('/api', healthRoutes(version, nowMs), notFound);
  app.use(studioFiles(studioDir));
  app.use(notFound);
  app.use(answerProblem);
  return app;
}
