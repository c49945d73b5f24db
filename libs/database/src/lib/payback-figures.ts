import { sql } from 'kysely';
import { JOB_FIGURES, type JobFigureColumns } from './job-figures';
import { type MachineDayRow } from './rollup-run';
import { type ShopTransaction } from './tenancy';

export interface PaybackMachine {
  machineId: string;
  code: string;
  name: string;
  kind: string;
  inServiceOn: string | null;
  ratedForceKn: string | null;
  bedLengthMm: string | null;
  /** Sum of its cost items. */
  outlay: string;
}

/** A machine with its outlay, by id, or by code or else name whatever the case. */
export async function findPaybackMachine(
  trx: ShopTransaction,
  wanted: { machineId: string } | { codeOrName: string },
): Promise<PaybackMachine | null> {
  const isWanted =
    'machineId' in wanted
      ? sql`m.machine_id = ${wanted.machineId}::uuid`
      : sql`lower(${wanted.codeOrName}) in (lower(m.code), lower(m.name))`;
  const byCodeFirst =
    'machineId' in wanted ? sql`m.code` : sql`lower(m.code) = lower(${wanted.codeOrName}) desc`;
  const { rows } = await sql<PaybackMachine>`
    select m.machine_id, m.code, m.name, m.kind, m.in_service_on, m.rated_force_kn, m.bed_length_mm,
      (select coalesce(sum(i.amount), 0)::numeric(16,2) from machine_cost_item i
        where i.shop_id = m.shop_id and i.machine_id = m.machine_id) as outlay
    from machine m
    where ${isWanted}
    order by ${byCodeFirst}, m.code
    limit 1`.execute(trx);
  return rows[0] ?? null;
}

/** A machine's day with its hours. */
export interface MachineDayFigures extends Omit<MachineDayRow, 'machineId'> {
  hours: string;
  billableHours: string;
}

/** All days of a machine in service, by date. */
export async function listMachineDays(
  trx: ShopTransaction,
  { machineId, inServiceOn }: PaybackMachine,
): Promise<MachineDayFigures[]> {
  return trx
    .selectFrom('machineDay')
    .select(['postedOn', 'hours', 'billableHours', 'earned', 'operatorLabour', 'running'])
    .where('machineId', '=', machineId)
    .where('postedOn', '>=', sql<string>`${inServiceOn}::date`)
    .orderBy('postedOn')
    .execute();
}

export interface MachineJobNet extends Pick<
  JobFigureColumns,
  'margin' | 'marginIsProvisional' | 'isToInvoice'
> {
  jobId: string;
  number: string;
  title: string;
  isBillable: boolean;
  /** earned − operator's labour − running */
  net: string;
}

/**
 * What each job brought a machine, most first, beside how the whole job stands; `jobs` and `allNet` are over all of
 * them, not only those listed.
 */
export async function listMachineJobNets(
  trx: ShopTransaction,
  { machineId, inServiceOn }: PaybackMachine,
  limit: number,
): Promise<(MachineJobNet & { jobs: number; allNet: string })[]> {
  const { rows } = await sql<MachineJobNet & { jobs: number; allNet: string }>`
    select j.job_id, j.number, j.title, j.is_billable, n.net, n.jobs, n.all_net,
      m.margin, m.margin_is_provisional, m.is_to_invoice
    from (
      select k.*, count(*) over () as jobs, sum(k.net) over () as all_net,
        row_number() over (order by k.net desc, o.number) as place
      from (
        select shop_id, job_id, sum(earned - operator_labour - running) as net
        from machine_job_day
        where machine_id = ${machineId}::uuid and posted_on >= ${inServiceOn}::date
        group by 1, 2
      ) k
      join job o on o.shop_id = k.shop_id and o.job_id = k.job_id
    ) n
    join job j on j.shop_id = n.shop_id and j.job_id = n.job_id ${JOB_FIGURES}
    where n.place <= ${limit}
    order by n.place`.execute(trx);
  return rows;
}
