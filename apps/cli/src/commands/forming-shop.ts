import { type FormingReference, type PressRun } from '@brakeven/contract';
import type { FitEstimate, FitEstimateRow, FitQuestion } from '@brakeven/use-cases';
import { D, formatForce, formatLength, toForce, toLength, type UnitSystem } from '@brakeven/values';
import { type Command } from 'commander';
import { type Cli } from '../cli';
import { withShop } from '../databases';
import { type Column, printTable } from '../print-table';

/** `forming fit`, `forming tools`, `forming runs`: what needs the shop's own tools */
export function addFormingOfShop(forming: Command, cli: Cli): void {
  forming
    .command('fit')
    .description('Which of the shop’s openings a bend fits on, with the best one marked')
    .requiredOption('--machine <code>', 'code of the press')
    .requiredOption('--shop <name>', 'in which shop')
    .requiredOption('--material <material>', 'such as mild-steel, a36, 304, 5052, or one of the shop’s own')
    .requiredOption('--thickness <thickness>', 'such as 10ga, 3/16 or 3mm')
    .requiredOption('--length <length>', 'of the bend, such as 4ft')
    .option('--angle <angle>', 'inside angle of the finished part; 90 if left out')
    .option('--flange <length>', 'shortest outside flange')
    .option('--punch <name>', 'name of the punch, to look at its force limit and nose too')
    .action((options: FitQuestion & { shop: string }) => showFit(cli, options));
  forming
    .command('tools')
    .description('Punches and dies by machine; lengths in mm and limits in kN per metre with --json')
    .requiredOption('--shop <name>', 'in which shop')
    .action((options: { shop: string }) => listTools(cli, options.shop));
  forming
    .command('runs')
    .description('Press runs, latest first; lengths in mm and forces in kN with --json')
    .requiredOption('--shop <name>', 'in which shop')
    .option('--above-line', 'only runs above the line that the shop keeps below')
    .action((options: { shop: string; aboveLine?: true }) => listRuns(cli, options));
}

async function showFit(cli: Cli, { shop, ...question }: FitQuestion & { shop: string }): Promise<void> {
  const { estimateFit } = await import('@brakeven/use-cases');
  const fit = await withShop(cli, shop, (context) => estimateFit(context, question));
  cli.answer({ json: fit, text: () => printFit(fit) });
}

function printFit(fit: FitEstimate): string {
  const best = fit.rows.find(({ isBest }) => isBest);
  const lines = [
    best ? `Best: die ${best.die}, opening ${figure(best.opening)} ${fit.unit}.` : '',
    fit.reason,
    fit.openingNeeded === null
      ? `No opening stays under ${figure(fit.linePercent)} % of the rating.`
      : `An opening of ${figure(fit.openingNeeded)} ${fit.unit} or more stays under ${figure(fit.linePercent)} % of the rating of ${fit.machine}.`,
  ];
  return [
    printTable(fit.rows, toFitColumns(fit)),
    '',
    ...lines.filter((line) => line !== ''),
    '',
    ...fit.notes,
    ...fit.cautions,
  ].join('\n');
}

function toFitColumns({ unit, forceUnit }: FitEstimate): Column<FitEstimateRow>[] {
  return [
    { title: '', of: ({ isBest }) => (isBest ? 'best' : '') },
    { title: 'Die', of: ({ die }) => die },
    { title: `Opening ${unit}`, of: ({ opening }) => figure(opening), isFigure: true },
    {
      title: '÷ thickness',
      of: ({ openingOverThickness }) => figure(openingOverThickness),
      isFigure: true,
    },
    { title: `Force ${forceUnit}`, of: toForceBand, isFigure: true },
    {
      title: 'Of rating',
      of: ({ share, ratingOf }) => (share === null ? '' : `${Math.round(share * 100)} % of the ${ratingOf}`),
      isFigure: true,
    },
    { title: 'Radius', of: ({ insideRadius }) => figure(insideRadius), isFigure: true },
    { title: 'Shortest flange', of: ({ shortestFlange }) => figure(shortestFlange), isFigure: true },
    { title: 'Verdict', of: toVerdict },
  ];
}

function toForceBand({ forceLow, forceHigh }: FitEstimateRow): string {
  return forceLow === null || forceHigh === null ? '' : `${figure(forceLow)} to ${figure(forceHigh)}`;
}

const VERDICTS = { fits: 'fits', 'with-care': 'with care', no: 'no' } as const;

function toVerdict({ verdict, objections }: FitEstimateRow): string {
  const words = objections.map((objection) => objection.words).join(' ');
  return words === '' ? VERDICTS[verdict] : `${VERDICTS[verdict]}: ${words}`;
}

async function listTools(cli: Cli, shop: string): Promise<void> {
  const { getFormingReference } = await import('@brakeven/use-cases');
  const { units, reference } = await withShop(cli, shop, async (context) => ({
    units: context.shop.units,
    reference: await getFormingReference(context),
  }));
  const { machines, punches, dies } = reference;
  const tools = machines.map((machine) => ({
    machine: machine.code,
    punches: punches.filter(({ machineId }) => machineId === machine.machineId),
    dies: dies.filter(({ machineId }) => machineId === machine.machineId),
  }));
  const json = { machines: tools.filter((one) => one.punches.length + one.dies.length > 0) };
  cli.answer({ json, text: () => printTable(toToolRows(reference), toToolColumns(units)) });
}

interface ToolRow {
  machine: string;
  tool: string;
  name: string;
  openingMm: string | null;
  radiusMm: string | null;
  angle: string | null;
  lengthMm: string | null;
}

function toToolRows({ machines, punches, dies }: FormingReference): ToolRow[] {
  return machines.flatMap(({ machineId, code: machine }) => [
    ...punches
      .filter((punch) => punch.machineId === machineId)
      .map(({ name, noseRadiusMm: radiusMm, angle, lengthMm }) => {
        return { machine, tool: 'punch', name, openingMm: null, radiusMm, angle, lengthMm };
      }),
    ...dies
      .filter((die) => die.machineId === machineId)
      .flatMap(({ name, lengthMm, openings }) =>
        openings.map(({ openingMm, angle, shoulderRadiusMm: radiusMm }) => {
          return { machine, tool: 'die', name, openingMm, radiusMm, angle, lengthMm };
        }),
      ),
  ]);
}

function toToolColumns(units: UnitSystem): Column<ToolRow>[] {
  const length = (millimetres: string | null) =>
    millimetres === null ? '' : plain(formatLength(toLength(D(millimetres), 'mm'), units));
  return [
    { title: 'Machine', of: ({ machine }) => machine },
    { title: 'Tool', of: ({ tool }) => tool },
    { title: 'Name', of: ({ name }) => name },
    { title: 'Opening', of: ({ openingMm }) => length(openingMm), isFigure: true },
    { title: 'Radius', of: ({ radiusMm }) => length(radiusMm), isFigure: true },
    { title: 'Angle', of: ({ angle }) => (angle === null ? '' : `${angle}°`), isFigure: true },
    { title: 'Length', of: ({ lengthMm }) => length(lengthMm), isFigure: true },
  ];
}

const RUNS_SHOWN = 500;

async function listRuns(cli: Cli, { shop, aboveLine }: { shop: string; aboveLine?: true }): Promise<void> {
  const { listPressRuns } = await import('@brakeven/use-cases');
  const query = { limit: RUNS_SHOWN, show: 'live', sort: 'runOn', direction: 'desc' } as const;
  const { units, runs } = await withShop(cli, shop, async (context) => ({
    units: context.shop.units,
    runs: (await listPressRuns(context, { ...query, ...(aboveLine ? { aboveLine: 'true' } : {}) })).items,
  }));
  cli.answer({ json: { runs }, text: () => printTable(runs, toRunColumns(units)) });
}

function toRunColumns(units: UnitSystem): Column<PressRun>[] {
  const length = (millimetres: string) => plain(formatLength(toLength(D(millimetres), 'mm'), units));
  return [
    { title: 'Date', of: ({ runOn }) => runOn },
    { title: 'Job', of: ({ jobNumber }) => jobNumber },
    { title: 'Machine', of: ({ machine }) => machine },
    { title: 'Material', of: ({ material }) => material },
    { title: 'Opening', of: ({ openingMm }) => length(openingMm), isFigure: true },
    { title: 'Bend length', of: ({ bendLengthMm }) => length(bendLengthMm), isFigure: true },
    {
      title: 'Force used',
      of: ({ forceUsedKn }) => plain(formatForce(toForce(D(forceUsedKn), 'kN'), units)),
      isFigure: true,
    },
    {
      title: 'Of rating',
      of: ({ share }) => (share === null ? '' : `${Math.round(share * 100)} %`),
      isFigure: true,
    },
    { title: '', of: ({ isAboveLine }) => (isAboveLine ? 'above the line' : '') },
  ];
}

const plain = (text: string): string => text.replace('\u00a0', ' ');

const FIGURES = new Intl.NumberFormat('en-US', { maximumSignificantDigits: 4 });

function figure(value: number): string {
  return FIGURES.format(value);
}
