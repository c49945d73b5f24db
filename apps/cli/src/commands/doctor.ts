import { type Finding, type ShopContext } from '@brakeven/use-cases';
import { type Command } from 'commander';
import { actorName, withDatabase, withOwnerDatabase } from '../databases';
import { type Cli, EXIT } from '../cli';
import { printTable } from '../print-table';

const NODE_VERSION_MIN = [20, 19] as const;

/** `doctor` */
export function addDoctor(program: Command, cli: Cli): void {
  program
    .command('doctor')
    .description('Look whether everything is as it should be: versions, database, schema, costs, totals')
    .action(() => examine(cli));
}

async function examine(cli: Cli): Promise<void> {
  const { examineDatabase, listShops } = await import('@brakeven/use-cases');
  const findings = [examineNode()];
  findings.push(...(await withDatabase(cli, examineDatabase)));
  const schema = await examineSchema(cli);
  findings.push(schema);
  if (schema.isGood) {
    const shops = await withOwnerDatabase(cli, listShops);
    findings.push(
      ...(await examineShops(
        cli,
        shops.map(({ name }) => name),
      )),
    );
  }
  cli.answer({
    json: { isGood: findings.every(({ isGood }) => isGood), findings },
    text: () =>
      printTable(findings, [
        { title: '', of: ({ isGood }) => (isGood ? 'good' : 'BAD') },
        { title: 'What', of: ({ subject }) => subject },
        { title: 'Finding', of: ({ message }) => message },
      ]),
    exitCode: findings.every(({ isGood }) => isGood) ? EXIT.done : EXIT.refused,
  });
}

function examineNode(): Finding {
  const [major = 0, minor = 0] = process.versions.node.split('.').map(Number);
  const [majorMin, minorMin] = NODE_VERSION_MIN;
  const isGood = major > majorMin || (major === majorMin && minor >= minorMin);
  const message =
    process.versions.node + (isGood ? '' : `; at least ${NODE_VERSION_MIN.join('.')} is needed`);
  return { subject: 'Node.js', isGood, message };
}

async function examineSchema(cli: Cli): Promise<Finding> {
  const { listPendingMigrations } = await import('@brakeven/use-cases');
  const pending = await withOwnerDatabase(cli, listPendingMigrations);
  const isGood = pending.length === 0;
  const message = isGood ? 'up to date' : `database migrate has to apply ${pending.join(', ')}`;
  return { subject: 'Schema', isGood, message };
}

async function examineShops(cli: Cli, names: readonly string[]): Promise<Finding[]> {
  const { examineBooks, openShop } = await import('@brakeven/use-cases');
  const findings: Finding[] = [];
  await withDatabase(cli, async (db) => {
    for (const name of names) {
      const context = await openShop(db, name, actorName());
      findings.push(await examineRollup(context), ...(await examineBooks(context)));
    }
  });
  return findings;
}

/** Days that wait are no fault: the nightly run takes them. */
async function examineRollup(context: ShopContext): Promise<Finding> {
  const { getRollupStatus } = await import('@brakeven/use-cases');
  const { through, daysWaiting, lastRunAt } = await getRollupStatus(context);
  const last = lastRunAt === null ? 'never run' : `through ${through ?? 'no day'}, last run ${lastRunAt}`;
  return {
    subject: `Costs of ${context.shop.name}`,
    isGood: true,
    message: `${last}, ${daysWaiting} days wait`,
  };
}
