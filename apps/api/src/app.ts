import { AppError } from '@brakeven/contract';
import { type Database, type SheetReader } from '@brakeven/use-cases';
import compression from 'compression';
import express, { type Express, Router } from 'express';
import { type Store } from 'express-session';
import { type Logger } from 'pino';
import { type Api } from './api';
import { mountAudit } from './audit/audit.routes';
import { mountCustomers } from './customers/customers.routes';
import { mountForming } from './forming/forming.routes';
import { mountHours } from './hours/hours.routes';
import { mountJobMoney } from './job-money/job-money.routes';
import { mountJobs } from './jobs/jobs.routes';
import { mountMachines } from './machines/machines.routes';
import { mountMaterials } from './materials/materials.routes';
import { handleProblem } from './middleware/problem-handler';
import { requestLog } from './middleware/request-log';
import { securityHeaders } from './middleware/security-headers';
import { signInRateLimit } from './middleware/sign-in-rate-limit';
import { webApp } from './middleware/web-app';
import { mountMonths } from './months/months.routes';
import { createMount } from './mount';
import { mountPeople } from './people/people.routes';
import { type ProgressHub } from './progress/progress-hub';
import { mountProgress } from './progress/progress.routes';
import { mountRollup } from './rollup/rollup.routes';
import { mountSavedViews } from './saved-views/saved-views.routes';
import { mountService } from './service/service.routes';
import { CsrfTokens } from './session/csrf-tokens';
import { createAuthenticate } from './session/password-strategy';
import { sessionCookie } from './session/session-cookie';
import { mountSession } from './session/session.routes';
import { mountSetup } from './setup/setup.routes';
import { mountShop } from './shop/shop.routes';
import { mountTimesheets } from './timesheets/timesheets.routes';
import { mountUsers } from './users/users.routes';
import { mountWorkings } from './workings/workings.routes';

export interface AppDependencies {
  db: Database;
  sessionStore: Store;
  sessionSecret: string;
  reader: SheetReader;
  logger: Logger;
  progress: ProgressHub;
  /** Folder of the built web application. */
  webRoot?: string;
  /** How many proxies stand in front. */
  proxies?: number;
  /** Whether answers are held against the contract. */
  checkAnswers?: boolean;
  /** Failed sign-ins that one network address may make in 15 minutes. */
  signInFailuresMax?: number;
}

/** Builds the application; does not listen. */
export function createApp(dependencies: AppDependencies): Express {
  const app = express();
  app.disable('x-powered-by');
  app.set('trust proxy', dependencies.proxies ?? 0);
  app.use(requestLog(dependencies.logger));
  app.use(securityHeaders());
  app.use(compression());
  app.use('/api', createApiRouter(dependencies));
  if (dependencies.webRoot) app.use(webApp(dependencies.webRoot));
  app.use(() => {
    throw new AppError('not_found', 'There is nothing at this address.');
  });
  app.use(handleProblem);
  return app;
}

function createApiRouter(dependencies: AppDependencies): Router {
  const { db, sessionStore, sessionSecret, reader, progress, checkAnswers = false } = dependencies;
  const router = Router();
  mountService(router, db);
  router.use(sessionCookie(sessionStore, sessionSecret));
  router.use(express.json({ limit: '1mb' }));
  const tokens = new CsrfTokens(sessionSecret);
  const mount = createMount(router, { db, tokens, checkAnswers });
  const api: Api = { mount, db, reader, progress };
  mountSession(api, {
    tokens,
    authenticate: createAuthenticate(db),
    rateLimit: signInRateLimit(dependencies.signInFailuresMax ?? 50),
  });
  for (const mountResource of RESOURCES) mountResource(api);
  router.use(() => {
    throw new AppError('not_found', 'The API has nothing at this address.');
  });
  return router;
}

const RESOURCES: readonly ((api: Api) => void)[] = [
  mountShop,
  mountUsers,
  mountPeople,
  mountMachines,
  mountJobs,
  mountJobMoney,
  mountMaterials,
  mountCustomers,
  mountForming,
  mountHours,
  mountTimesheets,
  mountMonths,
  mountProgress,
  mountSetup,
  mountRollup,
  mountAudit,
  mountSavedViews,
  mountWorkings,
];
