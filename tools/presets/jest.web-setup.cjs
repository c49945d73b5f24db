const { setupZonelessTestEnv } = require('jest-preset-angular/setup-env/zoneless');

setupZonelessTestEnv({ errorOnUnknownElements: true, errorOnUnknownProperties: true });
