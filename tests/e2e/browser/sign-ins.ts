import { type Role } from '@brakeven/contract';

export interface SignIn {
  role: Role;
  email: string;
  password: string;
}

/**
 * The demo shop's sign-in for a role.
 *
 * @throws Error when the suite was not started by `npm test`, which names the sign-ins
 */
export function findSignIn(role: Role): SignIn {
  const signIns = JSON.parse(process.env['E2E_SIGN_INS'] ?? '[]') as SignIn[];
  const found = signIns.find((signIn) => signIn.role === role);
  if (!found) throw new Error(`No sign-in for ${role}. Run the journeys with: npm test -- --only e2e`);
  return found;
}
