import { customerEndpoints } from './customers';
import { hoursEndpoints } from './hours';
import { jobMoneyEndpoints } from './job-money';
import { jobEndpoints } from './jobs';
import { machineEndpoints } from './machines';
import { materialEndpoints } from './materials';
import { paybackEndpoints } from './payback';
import { peopleEndpoints } from './people';
import { rollupEndpoints } from './rollup';
import { sessionEndpoints } from './session';
import { setupEndpoints } from './setup';
import { timesheetEndpoints } from './timesheets';
import { workingsEndpoints } from './workings';

/** Every route of the API; the server mounts them from here and the OpenAPI document lists them. */
export const ENDPOINTS = {
  ...sessionEndpoints,
  ...peopleEndpoints,
  ...machineEndpoints,
  ...jobEndpoints,
  ...jobMoneyEndpoints,
  ...materialEndpoints,
  ...customerEndpoints,
  ...hoursEndpoints,
  ...timesheetEndpoints,
  ...setupEndpoints,
  ...rollupEndpoints,
  ...paybackEndpoints,
  ...workingsEndpoints,
};
