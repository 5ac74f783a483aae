import path from 'node:path';
import express, { type RequestHandler, type Response, Router } from 'express';

/**
 * Serves the built studio. Files under `assets/` carry a hash in their name and never change; `index.html` is
 * asked for anew each time, and answers every page address so that the studio's own routes can be reloaded.
 *
 * @param studioDir  absolute path of the built studio
 */
export function studioFiles(studioDir: string): Router {
  const router = Router();
  router.use(express.static(studioDir, { index: false, redirect: false, cacheControl: false, setHeaders: setCaching }));
  router.use(answerPage(studioDir));
  return router;
}

function setCaching(res: Response, file: string): void {
  const isHashed = file.split(path.sep).includes('assets');
  res.set('Cache-Control', isHashed ? 'public, max-age=31536000, immutable' : 'no-cache');
}

/** Only a browser that opens a page names text/html; a missing script or image must stay missing. */
function answerPage(studioDir: string): RequestHandler {
  return (req, res, next) => {
    const opensPage = req.method === 'GET' && (req.get('accept') ?? '').includes('text/html');
    if (!opensPage || req.path.startsWith('/assets/')) {
      next();
      return;
    }
    res.set('Cache-Control', 'no-cache');
    res.sendFile('index.html', { root: studioDir, cacheControl: false }, (error) => {
      if (error) next(error);
    });
  };
}
