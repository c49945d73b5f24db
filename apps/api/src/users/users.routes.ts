import { ENDPOINTS } from '@brakeven/contract';
import { createUser, listUsers, resetUserPassword, updateUser } from '@brakeven/use-cases';
import { type Api } from '../api';

/** Who may sign in, and as what. */
export function mountUsers({ mount }: Api): void {
  mount(ENDPOINTS.listUsers, ({ context }) => listUsers(context));
  mount(ENDPOINTS.createUser, ({ context, body }) => createUser(context, body));
  mount(ENDPOINTS.updateUser, ({ context, params, body }) => updateUser(context, params, body));
  mount(ENDPOINTS.resetUserPassword, ({ context, params }) => resetUserPassword(context, params));
}
