import './setup/node-version.mjs';
import { runJest, specKinds } from './setup/jest-suite.mjs';
import { ensureNpmPackages } from './setup/npm-packages.mjs';
import { createProgress, runScript } from './setup/progress.mjs';
import { tellWaiting } from './setup/set-up.mjs';
import { withSetupLock } from './setup/setup-lock.mjs';
import { staticChecks } from './setup/static-checks.mjs';
import { Tally, asOneCheck } from './setup/tally.mjs';

const progress = createProgress(process.stdout);
const tally = new Tally(progress);

await runScript(
  async () => {
    await withSetupLock(() => ensureNpmPackages(progress), tellWaiting(progress));
    for (const check of staticChecks) {
      await tally.run(check.title, asOneCheck(check.run));
    }
    const withoutPaths = Object.values(specKinds);
    await tally.run('Specs that need no database', () =>
      runJest({ environment: { TZ: 'UTC' }, withoutPaths }),
    );
    return tally.failed > 0 ? 1 : 0;
  },
  undefined,
  () => progress.say(`\n${tally.summary()}`),
);
