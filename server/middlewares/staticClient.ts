import { existsSync } from 'node:fs';
import { join } from 'node:path';
import express, { Router } from 'express';

/** The built client, from the folder the product was started in. */
const FOLDER = join(process.cwd(), 'dist/client');

/**
 * Serves the built client; every address that is neither a file nor below /api answers the page, whose router
 * takes over. File names under /assets carry a hash of their content and are kept for ever.
 */
export function staticClient(): Router {
  const router = Router();
  const page = join(FOLDER, 'index.html');
  router.use(
    '/assets',
    express.static(join(FOLDER, 'assets'), { immutable: true, maxAge: '1y', fallthrough: false }),
  );
  router.use(express.static(FOLDER, { index: false, maxAge: '1h' }));
  router.get('/{*rest}', (_request, response, next) => {
    if (!existsSync(page)) {
      next();
      return;
    }
    response.set('Cache-Control', 'no-cache').sendFile(page);
  });
  return router;
}
