import { createOpenApiDocument } from '@brakeven/contract';
import { type Database, pingDatabase } from '@brakeven/use-cases';
import { type Router } from 'express';

/** What programs ask rather than people: does it run, and what can it do. */
export function mountService(router: Router, db: Database): void {
  const document = createOpenApiDocument();
  router.get('/health', async (_request, response) => {
    await pingDatabase(db);
    response.set('Cache-Control', 'no-store').json({ status: 'ok' });
  });
  router.get('/openapi.json', (_request, response) => {
    response.set('Cache-Control', 'no-cache').json(document);
  });
}
