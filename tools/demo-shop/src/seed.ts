import {
  type Database,
  changePassword,
  closeMonth,
  createShop,
  createUser,
  importSetup,
  importTimesheet,
  listEmployees,
  listMonths,
  listShops,
  listUsers,
  openShop,
  resetUserPassword,
  updateUser,
  type SheetReader,
  type ShopContext,
} from '@brakeven/use-cases';
import {
  addDays,
  formatLocalDate,
  type LocalDate,
  startOfWeek,
  todayIn,
  toLocalDate,
} from '@brakeven/values';
import { writeSetupWorkbook, writeTimesheetWorkbook } from '@brakeven/workbook';
import { buildCosts } from './build-costs';
import { buildSetup } from './build-setup';
import { buildTimesheet, buildUnsettledTimesheet } from './build-timesheets';
import { planCosts, type PlannedCosts } from './plan-costs';
import { buildTools, planRuns, planTrials } from './plan-forming';
import { type PlannedJob, planJobs } from './plan-jobs';
import { type PlannedEntry, planWeeks } from './plan-weeks';
import { createRandom } from './random';
import { seedForming } from './seed-forming';
import { SHOP, SIGN_INS, WEEKS } from './story';

const SEED = 20260301;
const MONDAY = 1;
const DAYS_LEFT_OPEN = 62;

export interface DemoTools {
  db: Database;
  ownerDb: Database;
  reader: SheetReader;
  now?: Date;
  onProgress?: (message: string) => void;
}

export interface Demo {
  firstMonday: LocalDate;
  jobs: readonly PlannedJob[];
  weeks: readonly (readonly PlannedEntry[])[];
  costs: PlannedCosts;
}

/** The demo shop's whole history, ending with the last full week before `today`. */
export function planDemo(today: LocalDate): Demo {
  const random = createRandom(SEED);
  const jobs = planJobs(random);
  const weeks = planWeeks(jobs, random);
  return {
    firstMonday: addDays(startOfWeek(today, MONDAY), -7 * WEEKS),
    jobs,
    weeks,
    costs: planCosts(jobs, weeks),
  };
}

/**
 * Makes the demo shop as a shop would start: a set-up workbook, then one workbook a week through the same imports,
 * then the users. Can be stopped at any moment and run again: what is there already stays.
 *
 * @returns 'made' now, 'there' already, or 'not wanted' because the database has a shop of somebody's own
 */
export async function seedDemoShop(tools: DemoTools): Promise<'made' | 'there' | 'not wanted'> {
  const shops = await listShops(tools.ownerDb);
  const isThere = shops.some((shop) => shop.name === SHOP.name);
  if (shops.length > 0 && !isThere) return 'not wanted';
  if (!isThere) {
    const owner = SIGN_INS.find((signIn) => signIn.role === 'owner');
    if (!owner) throw new Error('The demo shop has no owner.');
    await createShop(
      tools.ownerDb,
      { ...SHOP, owner: { name: owner.name, email: owner.email } },
      'demo shop',
    );
  }
  const context = await openShop(tools.db, SHOP.name, 'demo shop');
  if ((await listUsers(context)).length >= SIGN_INS.length) return 'there';
  const demo = planDemo(todayIn(SHOP.timeZone, tools.now));
  await importHistory(asBookkeeper(context), demo, tools);
  tools.onProgress?.('Trial bends and press runs');
  // Whoever logs at the press needs the account by then.
  await createSignIns(context, (signIn) => signIn.role === 'operator');
  await seedForming(
    context,
    planRuns(demo.firstMonday, demo.weeks.slice(0, -1)),
    planTrials(demo.firstMonday),
  );
  await closeOldMonths(asBookkeeper(context), addDays(todayIn(SHOP.timeZone, tools.now), -DAYS_LEFT_OPEN));
  await createSignIns(context);
  return 'made';
}

/** The week that is still to come in, for trying the import: its file name and content. */
export async function writeUnsettledTimesheet(now?: Date): Promise<{ name: string; bytes: Buffer }> {
  const { firstMonday, weeks } = planDemo(todayIn(SHOP.timeZone, now));
  const monday = addDays(firstMonday, 7 * (WEEKS - 1));
  const entries = weeks[WEEKS - 1] ?? [];
  return {
    name: fileName(monday),
    bytes: await writeTimesheetWorkbook(buildUnsettledTimesheet(monday, entries)),
  };
}

function asBookkeeper(context: ShopContext): ShopContext {
  const bookkeeper = SIGN_INS.find((signIn) => signIn.role === 'bookkeeper');
  return { ...context, actor: { ...context.actor, name: bookkeeper?.name ?? context.actor.name } };
}

const fileName = (monday: LocalDate): string => `Timesheet ${monday}.xlsx`;

async function importHistory(context: ShopContext, demo: Demo, tools: DemoTools): Promise<void> {
  const importWorkbook = async (isHistory: boolean): Promise<void> => {
    const { firstMonday, jobs, costs } = demo;
    const bytes = await writeSetupWorkbook({
      ...buildSetup(firstMonday, jobs, { isHistory }),
      ...buildTools(),
      ...buildCosts(firstMonday, jobs, costs, { isHistory }),
    });
    await importSetup(context, { name: 'Set-up.xlsx', bytes }, {}, { reader: tools.reader });
  };
  await importWorkbook(true);
  // The last week stays out, for whoever tries the import.
  for (const [week, entries] of demo.weeks.slice(0, -1).entries()) {
    const monday = addDays(demo.firstMonday, 7 * week);
    tools.onProgress?.(
      `Week of ${formatLocalDate(monday, 'medium')}, ${week + 1} of ${demo.weeks.length - 1}`,
    );
    const bytes = await writeTimesheetWorkbook(buildTimesheet(week, monday, entries));
    await importTimesheet(context, { name: fileName(monday), bytes }, {}, { reader: tools.reader });
  }
  await importWorkbook(false);
}

/** As the bookkeeper would have: in order, the latest months left open for whoever tries it. */
async function closeOldMonths(context: ShopContext, before: LocalDate): Promise<void> {
  for (;;) {
    const next = (await listMonths(context)).months.find(({ isNext }) => isNext);
    if (!next || startOfNextMonth(next.month) > before) return;
    await closeMonth(context, { month: next.month });
  }
}

const startOfNextMonth = (month: string): string => addDays(toLocalDate(`${month}-28`), 4).slice(0, 8) + '01';

async function createSignIns(
  context: ShopContext,
  isWanted: (signIn: (typeof SIGN_INS)[number]) => boolean = () => true,
): Promise<void> {
  const employees = await listEmployees(context);
  for (const { name, email, role, password, employee } of SIGN_INS.filter(isWanted)) {
    const employeeId = employees.find((other) => other.number === employee)?.employeeId ?? null;
    const known = (await listUsers(context)).find((user) => user.email === email);
    const { user, temporaryPassword } = known
      ? await resetUserPassword(context, { userId: known.userId })
      : await createUser(context, { name, email, role, employeeId });
    if (user.employeeId !== employeeId) await updateUser(context, { userId: user.userId }, { employeeId });
    const own = { ...context, actor: { userId: user.userId, name, role, employeeId } };
    await changePassword(
      own,
      { currentPassword: temporaryPassword, newPassword: password },
      { keepSessionId: null },
    );
  }
}
