import { AppError, emailInputSchema, nameInputSchema, type Role, ROLES, type User } from '@brakeven/contract';
import { type ShopContext } from '@brakeven/use-cases';
import { type Command, Option } from 'commander';
import { type Cli } from '../cli';
import { withShop } from '../databases';
import { readBy } from '../option-parsers';
import { printPairs, printTable } from '../print-table';

interface AddOptions {
  shop: string;
  name: string;
  email: string;
  role: Role;
  employee?: string;
}

/** `user add`, `user list`, `user reset-password` */
export function addUser(program: Command, cli: Cli): void {
  const user = program.command('user').description('Who may sign in');
  user
    .command('add')
    .description('Add somebody who may sign in, with a temporary password that is told')
    .requiredOption('--shop <name>', 'in which shop')
    .requiredOption('--name <name>', 'name of the person', readBy(nameInputSchema))
    .requiredOption('--email <address>', 'to sign in with', readBy(emailInputSchema))
    .addOption(new Option('--role <role>', 'what the person may').choices(ROLES).makeOptionMandatory())
    .option('--employee <number>', 'the employee that this is, so that an operator sees the own hours')
    .action((options: AddOptions) => add(cli, options));
  user
    .command('list')
    .description('Everybody who may sign in, or once might')
    .requiredOption('--shop <name>', 'in which shop')
    .action((options: { shop: string }) => list(cli, options.shop));
  user
    .command('reset-password')
    .description('Give somebody a new temporary password')
    .argument('<email>', 'of whom', readBy(emailInputSchema))
    .requiredOption('--shop <name>', 'in which shop')
    .action((email: string, options: { shop: string }) => resetPassword(cli, email, options.shop));
}

async function add(cli: Cli, { shop, employee, ...options }: AddOptions): Promise<void> {
  const { createUser } = await import('@brakeven/use-cases');
  const created = await withShop(cli, shop, async (context) => {
    const employeeId = employee === undefined ? null : await findEmployeeId(context, employee);
    return createUser(context, { ...options, employeeId });
  });
  answerPassword(cli, created);
}

async function findEmployeeId(context: ShopContext, number: string): Promise<string> {
  const { listEmployees } = await import('@brakeven/use-cases');
  const employee = (await listEmployees(context)).find((one) => one.number === number);
  if (!employee) throw new AppError('not_found', `There is no employee with the number '${number}'.`);
  return employee.employeeId;
}

async function resetPassword(cli: Cli, email: string, shop: string): Promise<void> {
  const { listUsers, resetUserPassword } = await import('@brakeven/use-cases');
  const reset = await withShop(cli, shop, async (context) => {
    const user = (await listUsers(context)).find((one) => one.email === email);
    if (!user) throw new AppError('not_found', `Nobody in this shop signs in as ${email}.`);
    return resetUserPassword(context, user);
  });
  answerPassword(cli, reset);
}

function answerPassword(
  cli: Cli,
  { user, temporaryPassword }: { user: User; temporaryPassword: string },
): void {
  const { userId, name, email, role } = user;
  cli.answer({
    json: { userId, name, email, role, temporaryPassword },
    text: () =>
      printPairs([
        ['Name', name],
        ['E-mail', email],
        ['Role', role],
        ['Temporary password', `${temporaryPassword} (told once, to be changed at the first sign-in)`],
      ]),
  });
}

async function list(cli: Cli, shop: string): Promise<void> {
  const { listUsers } = await import('@brakeven/use-cases');
  const users = await withShop(cli, shop, listUsers);
  cli.answer({
    json: { users },
    text: () =>
      printTable(users, [
        { title: 'Name', of: ({ name }) => name },
        { title: 'E-mail', of: ({ email }) => email },
        { title: 'Role', of: ({ role }) => role },
        { title: 'Active', of: ({ isActive }) => (isActive ? 'yes' : 'no') },
        { title: 'Last sign-in', of: ({ lastSignInAt }) => lastSignInAt ?? 'never' },
      ]),
  });
}
