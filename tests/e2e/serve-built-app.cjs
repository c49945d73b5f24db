const { join } = require('node:path');

/**
 * Starts the built API with the built web application on a free port. The journeys find its address in
 * E2E_ADDRESS; the demo shop's sign-ins are in E2E_SIGN_INS, as JSON. `npm test -- --only e2e` prepares the
 * database and the builds.
 */
module.exports = async () => {
  const { DATABASE_URL, DATABASE_OWNER_URL, SESSION_SECRET } = process.env;
  if (!DATABASE_URL || !DATABASE_OWNER_URL || !SESSION_SECRET) {
    throw new Error('The journeys need a database of their own. Run them with: npm test -- --only e2e');
  }
  const { startApi } = await import('../../tools/setup/programs.mjs');
  const { findFreePort } = await import('../../tools/setup/processes.mjs');
  const { stopOnSignals } = await import('../../tools/setup/shutdown.mjs');
  const { localDirectory } = await import('../../tools/setup/workspace.mjs');
  stopOnSignals();
  const service = await startApi({
    environment: { DATABASE_URL, DATABASE_OWNER_URL, SESSION_SECRET },
    port: await findFreePort(4300),
    logFile: join(localDirectory, 'api-e2e.log'),
    onError: (line) => process.stderr.write(`${line}\n`),
    mode: 'test',
  });
  process.env.E2E_ADDRESS = service.address;
  globalThis.builtApp = service;
};
