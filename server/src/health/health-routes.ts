import { Router } from 'express';
import type { Health, Readiness } from '../contract/health.ts';
import type { Db } from '../db/database.ts';
import { isMigrated } from '../db/migrate.ts';
import { HttpProblem } from '../http/problem.ts';

/**
 * `GET /api/health`: whether the server answers, which version it is and how long it has run.
 * `GET /api/ready`: whether it can work, which takes a database with every migration.
 *
 * @param version  version to report
 * @param nowMs    clock [ms]; only differences are used
 */
export function healthRoutes(version: string, nowMs: () => number, db: Db): Router {
  const startedMs = nowMs();
  const router = Router();
  router.get('/health', (_req, res) => {
    const health: Health = { status: 'ok', version, uptimeS: (nowMs() - startedMs) / 1000 };
    res.set('Cache-Control', 'no-store').json(health);
  });
  router.get('/ready', async (req, res) => {
    if (
      !(await canWork(db, (err) => {
        req.log.error({ err }, 'database does not answer');
      }))
    ) {
      throw new HttpProblem('NOT_READY', 'The database does not answer, or its schema is not the one of this program.');
    }
    const readiness: Readiness = { status: 'ready' };
    res.set('Cache-Control', 'no-store').json(readiness);
  });
  return router;
}

async function canWork(db: Db, report: (error: unknown) => void): Promise<boolean> {
  try {
    return await isMigrated(db);
  } catch (error) {
    report(error);
    return false;
  }
}
