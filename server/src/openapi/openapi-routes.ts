import { Router } from 'express';
import { docsPage } from './docs-page.ts';
import { openApiDocument } from './document.ts';

/** `GET /api/v1/openapi.json`, and the same as a page to read at `GET /api/docs`. */
export function openApiRoutes(version: string): Router {
  const document = openApiDocument(version);
  const page = docsPage(document);
  const router = Router();
  router.get('/v1/openapi.json', (_req, res) => {
    res.set('Cache-Control', 'no-cache').json(document);
  });
  router.get('/docs', (_req, res) => {
    res.set('Cache-Control', 'no-cache').type('html').send(page);
  });
  return router;
}
