import { type Response, Router, static as serveFiles } from 'express';
import { readFile } from 'node:fs/promises';
import { join } from 'node:path';
import { findStyleNonce } from './security-headers';

/** Names that hold a hash of their contents, so that the same name never means other bytes. */
const HASHED = /-[A-Z0-9]{8}\.\w+$/;

/** Serves the built web application; every address that is no file is one of its pages. */
export function webApp(root: string): Router {
  const router = Router();
  router.get(['/', '/index.html'], (_request, response) => sendPage(root, response));
  router.use(
    serveFiles(root, {
      index: false,
      redirect: false,
      setHeaders: (response, path) => {
        const isHashed = HASHED.test(path);
        response.setHeader('Cache-Control', isHashed ? 'public, max-age=31536000, immutable' : 'no-cache');
      },
    }),
  );
  router.get(/^\/[^.]*$/, (_request, response) => sendPage(root, response));
  return router;
}

/** The page tells Angular the nonce that its styles have to carry. */
async function sendPage(root: string, response: Response): Promise<void> {
  const page = await readFile(join(root, 'index.html'), 'utf8');
  response
    .set('Cache-Control', 'no-store')
    .type('html')
    .send(page.replace('<app-root', `<app-root ngCspNonce="${findStyleNonce(response)}"`));
}
