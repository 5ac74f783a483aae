import { Router } from 'express';
import type { Health } from '../contract/health.ts';

/**
 * `GET /api/health`: whether the server answers, which version it is and how long it has run.
 *
 * @param version  version to report
 * @param nowMs    clock [ms]; only differences are used
 */
export function healthRoutes(version: string, nowMs: () => number): Router {
  const startedMs = nowMs();
  const router = Router();
  router.get('/health', (_req, res) => {
    const health: Health = { status: 'ok', version, uptimeS: (nowMs() - startedMs) / 1000 };
    res.set('Cache-Control', 'no-store').json(health);
  });
  return router;
}
