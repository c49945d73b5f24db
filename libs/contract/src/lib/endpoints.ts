import { customerEndpoints } from './customers';
import { estimateEndpoints } from './estimates';
import { formingEndpoints } from './forming';
import { hoursEndpoints } from './hours';
import { jobMoneyEndpoints } from './job-money';
import { jobEndpoints } from './jobs';
import { machineEndpoints } from './machines';
import { materialEndpoints } from './materials';
import { monthEndpoints } from './months';
import { paybackEndpoints } from './payback';
import { peopleEndpoints } from './people';
import { pressRunEndpoints } from './press-runs';
import { rollupEndpoints } from './rollup';
import { savedViewEndpoints } from './saved-views';
import { sessionEndpoints } from './session';
import { setupEndpoints } from './setup';
import { timesheetEndpoints } from './timesheets';
import { trialBendEndpoints } from './trial-bends';
import { workingsEndpoints } from './workings';

/** Every route of the API; the server mounts them from here and the OpenAPI document lists them. */
export const ENDPOINTS = {
  ...sessionEndpoints,
  ...peopleEndpoints,
  ...machineEndpoints,
  ...formingEndpoints,
  ...trialBendEndpoints,
  ...pressRunEndpoints,
  ...jobEndpoints,
  ...estimateEndpoints,
  ...jobMoneyEndpoints,
  ...materialEndpoints,
  ...customerEndpoints,
  ...hoursEndpoints,
  ...timesheetEndpoints,
  ...monthEndpoints,
  ...setupEndpoints,
  ...rollupEndpoints,
  ...paybackEndpoints,
  ...savedViewEndpoints,
  ...workingsEndpoints,
};
