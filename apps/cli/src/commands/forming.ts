import type {
  AngleEstimate,
  BlankEstimate,
  BlankQuestion,
  DepthEstimate,
  DepthQuestion,
  ForceEstimate,
  ForceQuestion,
} from '@brakeven/use-cases';
import { type Command } from 'commander';
import { type Cli, UsageError } from '../cli';
import { printPairs, printTable } from '../print-table';
import { readWorkbookFile } from '../read-file';
import { addFormingOfShop } from './forming-shop';

const AFTER_HELP = `
Lengths as they are written in the shop: 10 ga, 3/16, 1 1/2 in, 0.1345", 5' 6", 4.5mm. A bare number is in the unit of
the first length that has one, and so is the answer; inches if none has.
Angles are inside angles of the finished part: 180 is flat. Only fit, tools and runs need a database.`;

/** `forming force`, `forming blank`, `forming depth`, and what needs the shop’s own tools */
export function addForming(program: Command, cli: Cli): void {
  const forming = program
    .command('forming')
    .description('Estimate bends: force, fit, blank, depth of the ram');
  forming.addHelpText('after', AFTER_HELP);
  addForce(forming, cli);
  addBlank(forming, cli);
  addDepth(forming, cli);
  addFormingOfShop(forming, cli);
}

function addForce(forming: Command, cli: Cli): void {
  forming
    .command('force')
    .description('Force of an air bend, as a band between two rules')
    .requiredOption('--material <material>', 'such as mild-steel, a36, 304, 5052')
    .requiredOption('--thickness <thickness>', 'such as 10ga, 3/16 or 3mm')
    .requiredOption('--length <length>', 'of the bend, such as 4ft')
    .requiredOption('--opening <opening>', 'of the die, such as 1in')
    .option('--punch-radius <radius>', 'nose of the punch')
    .option('--tensile <strength>', 'instead of the one shown for the material, such as 60ksi')
    .action((question: ForceQuestion) => showForce(cli, question));
}

function addBlank(forming: Command, cli: Cli): void {
  forming
    .command('blank')
    .description('Flat length, deductions and back-gauge positions of a part')
    .requiredOption('--flanges <lengths>', 'outside flanges in order, such as 1in,2in,1in')
    .requiredOption('--angles <angles>', 'inside angles, one fewer, such as 90,90')
    .requiredOption('--thickness <thickness>', 'such as 0.0598in; a gauge needs --material')
    .requiredOption('--radius <radius>', 'inside radius of the bends')
    .option('--k <k>', 'K-factor; left out, it follows from --k-from')
    .option('--k-from <source>', 'radius (DIN 6935), or soft, half-hard, hard (handbook)')
    .option('--trial <piece...>', "trial piece as 'blank: flange, flange'; K is then taken from it")
    .option('--trial-angle <angle>', 'inside angle of the trial pieces; 90 if left out')
    .option('--width <length>', 'of the piece along its bends, for weight and pieces')
    .option('--material <material>', 'for gauges and weight')
    .option('--sheet <size>', "width x length, the grain along its length, such as '48in x 96in'")
    .action((question: BlankQuestion) => showBlank(cli, question));
}

function addDepth(forming: Command, cli: Cli): void {
  forming
    .command('depth')
    .description('Reading of the ram for an angle, from trial bends')
    .requiredOption(
      '--trials <file>',
      '.csv or .xlsx with opening, thickness, punchRadius, shoulderRadius, depth, angle, units in the header',
    )
    .option('--angle <angle>', 'inside angle that is wanted')
    .option('--at-depth <depth>', 'or the reading of which the angle is wanted')
    .option('--material <material>', 'mild-steel if left out')
    .option('--thickness <thickness>', 'another sheet than most of the trial bends')
    .option('--opening <opening>', 'another opening')
    .option('--punch-radius <radius>', 'another punch')
    .option('--shoulder-radius <radius>', 'another shoulder')
    .action((options: DepthQuestion & { trials: string }) => showDepth(cli, options));
}

async function showForce(cli: Cli, question: ForceQuestion): Promise<void> {
  const { estimateForce } = await import('@brakeven/use-cases');
  const force = estimateForce(question);
  cli.answer({ json: force, text: () => printForce(force) });
}

function printForce(force: ForceEstimate): string {
  const length = (value: number) => `${figure(value)} ${force.lengthUnit}`;
  return withCautions(
    printPairs([
      ['Force', `${figure(force.forceLow)} to ${figure(force.forceHigh)} ${force.unit}`],
      ...force.rules.map(({ rule, force: by }) => [`  by ${rule}`, `${figure(by)} ${force.unit}`] as const),
      ['Strength used', `${figure(force.tensile.value)} ${force.tensile.unit}: ${force.tensile.source}`],
      ['Opening ÷ thickness', figure(force.openingOverThickness)],
      ['Inside radius', length(force.insideRadius)],
      ['Shortest flange', `${length(force.shortestFlange)} at 90°`],
    ]),
    force,
  );
}

async function showBlank(cli: Cli, question: BlankQuestion): Promise<void> {
  const { estimateBlank } = await import('@brakeven/use-cases');
  const blank = estimateBlank(question);
  cli.answer({ json: blank, text: () => printBlank(blank) });
}

function printBlank(blank: BlankEstimate): string {
  const head = printPairs([
    ['Flat', `${figure(blank.flat)} ${blank.unit}`],
    ['K', `${figure(blank.k.value)}: ${blank.k.words}`],
    ...(blank.weight ? [['Weight', `${figure(blank.weight.value)} ${blank.weight.unit}`] as const] : []),
    ...blank.layouts.map(
      ({ grain, pieces, yield: share }) =>
        [
          `Pieces, ${grain.replaceAll('-', ' ')}`,
          `${pieces}, ${Math.round(share * 100)} % of the sheet`,
        ] as const,
    ),
  ]);
  const bends = printTable(blank.bends, [
    { title: 'Inside angle', of: ({ insideAngle }) => figure(insideAngle), isFigure: true },
    { title: 'Deduction', of: ({ deduction }) => figure(deduction), isFigure: true },
    { title: 'Back gauge', of: ({ gauge }) => figure(gauge), isFigure: true },
    { title: 'Bend line', of: ({ bendLine }) => figure(bendLine), isFigure: true },
    { title: 'Flanges measured', of: ({ convention }) => convention.replaceAll('-', ' ') },
  ]);
  return withCautions(`${head}\n\n${bends}`, blank);
}

async function showDepth(
  cli: Cli,
  { trials, ...question }: DepthQuestion & { trials: string },
): Promise<void> {
  if ((question.angle === undefined) === (question.atDepth === undefined)) {
    throw new UsageError('Give --angle, or --at-depth, and not both.');
  }
  const { estimateDepth } = await import('@brakeven/use-cases');
  const depth = await estimateDepth(await readWorkbookFile(trials), question);
  cli.answer({ json: depth, text: () => printDepth(depth) });
}

function printDepth(answer: DepthEstimate | AngleEstimate): string {
  const { unit, setup } = answer;
  const isDepth = 'depth' in answer;
  const answerUnit = isDepth ? ` ${unit}` : '°';
  const value = isDepth ? answer.depth : answer.insideAngle;
  const band = `${figure(answer.low)} to ${figure(answer.high)}${answerUnit}`;
  return withCautions(
    printPairs([
      [isDepth ? 'Depth' : 'Inside angle', `${figure(value)}${answerUnit}, 9 of 10 bends ${band}`],
      ['Sheet and opening', `${figure(setup.thickness)} on ${figure(setup.opening)} ${unit}`],
      ['Springback', `${figure(answer.springback)}° ± ${figure(answer.springbackError)}°`],
      ['Datum', `${figure(answer.datum)} ${unit} ± ${figure(answer.datumError)} ${unit}`],
      ['Error of the fit', `${figure(answer.rmsAngle)}°`],
      ['Error left out', answer.looAngle === null ? 'cannot be had' : `${figure(answer.looAngle)}°`],
      ['Outliers', String(answer.bends.filter(({ isOutlier }) => isOutlier).length)],
      ...(answer.isGuess ? [['Guess', 'this sheet on this die was not among the trial bends'] as const] : []),
    ]),
    answer,
  );
}

function withCautions(
  text: string,
  { notes, cautions }: { notes: string[]; cautions: readonly string[] },
): string {
  return [text, '', ...notes, ...cautions].join('\n');
}

const FIGURES = new Intl.NumberFormat('en-US', { maximumSignificantDigits: 5 });

function figure(value: number): string {
  return FIGURES.format(value);
}
