import {
  createPressRun,
  createTrialBend,
  getDepthCard,
  getFormingReference,
  getPressRunChoices,
  listPressRuns,
  listTrialBends,
  listUsers,
  type ShopContext,
  updateDepthCard,
} from '@brakeven/use-cases';
import { type PlannedRun, type PlannedTrial } from './plan-forming';

type Reference = Awaited<ReturnType<typeof getFormingReference>>;

/** Notes trial bends, a depth card and press runs; what is there already stays, and the rest follows. */
export async function seedForming(
  context: ShopContext,
  runs: readonly PlannedRun[],
  trials: readonly PlannedTrial[],
): Promise<void> {
  const reference = await getFormingReference(context);
  await seedTrials(context, reference, trials);
  const jobIds = new Map(
    (await getPressRunChoices(context, {})).jobs.map(({ number, jobId }) => [number, jobId]),
  );
  const userIds = new Map((await listUsers(context)).map(({ name, userId }) => [name, userId]));
  const already = await countRuns(context);
  for (const run of runs.slice(already)) {
    const jobId = jobIds.get(run.job);
    if (jobId === undefined) throw new Error(`Job ${run.job} is not there to log a run on.`);
    const { job: _job, machine, punch, openingMm, loggedBy, ...values } = run;
    const keys = findKeys(reference, machine, punch, openingMm);
    const actor = { ...context.actor, name: loggedBy, userId: userIds.get(loggedBy) ?? null };
    await createPressRun({ ...context, actor }, { ...values, ...keys, jobId, entryId: null });
  }
}

async function seedTrials(
  context: ShopContext,
  reference: Reference,
  trials: readonly PlannedTrial[],
): Promise<void> {
  const already = (await listTrialBends(context, { limit: 500, show: 'all' })).items.length;
  for (const { openingMm, ...trial } of trials.slice(already)) {
    const keys = findKeys(reference, 'P2', 'Gooseneck', openingMm);
    await createTrialBend(context, { ...trial, ...keys });
  }
  const [first] = trials;
  if (!first) return;
  const { machineId } = findKeys(reference, 'P2', 'Gooseneck', first.openingMm);
  if ((await getDepthCard(context, { machineId })).sheets.length > 0) return;
  const sheets = new Map(
    trials.map(({ materialCode, thicknessMm, openingMm }) => {
      const { punchId, dieOpeningId } = findKeys(reference, 'P2', 'Gooseneck', openingMm);
      return [`${materialCode}|${openingMm}`, { materialCode, thicknessMm, punchId, dieOpeningId }];
    }),
  );
  await updateDepthCard(
    context,
    { machineId },
    { angles: [90, 105, 120, 135], sheets: [...sheets.values()] },
  );
}

async function countRuns(context: ShopContext): Promise<number> {
  const query = { limit: 500, sort: 'runOn', direction: 'asc' } as const;
  const [live, voided] = [
    await listPressRuns(context, { ...query, show: 'live' }),
    await listPressRuns(context, { ...query, show: 'voided' }),
  ];
  return live.items.length + voided.items.length;
}

function findKeys(
  { machines, punches, dies }: Reference,
  code: string,
  punchName: string,
  openingMm: string,
) {
  const machineId = machines.find((machine) => machine.code === code)?.machineId;
  const punchId = punches.find((punch) => punch.machineId === machineId && punch.name === punchName)?.punchId;
  const opening = dies
    .filter((die) => die.machineId === machineId)
    .flatMap(({ openings }) => openings)
    .find((one) => Number(one.openingMm) === Number(openingMm));
  if (!machineId || !punchId || !opening) throw new Error(`${code} lacks ${punchName} or ${openingMm} mm.`);
  return { machineId, punchId, dieOpeningId: opening.dieOpeningId };
}
