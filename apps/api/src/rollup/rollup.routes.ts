import { ENDPOINTS } from '@brakeven/contract';
import { getRollupStatus, runRollup } from '@brakeven/use-cases';
import { type Api } from '../api';

/** Through which day costs are rolled up, and rolling up the rest. */
export function mountRollup({ mount }: Api): void {
  mount(ENDPOINTS.getRollupStatus, ({ context }) => getRollupStatus(context));
  mount(ENDPOINTS.runRollup, ({ context }) => runRollup(context, {}));
}
