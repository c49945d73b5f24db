import { type CostCategory, type Figure } from '@brakeven/contract';
import { RULES } from '@brakeven/costing';
import { type LineSelection } from '@brakeven/database';

/** A figure that this one is made of. */
export interface FigurePart {
  label: string;
  figure: Figure;
  category: CostCategory;
}

/** How a figure that is a sum of lines is made. */
export interface LineFigure {
  title: string;
  rule: string;
  unit: LineSelection['unit'];
  signs: LineSelection['signs'];
  /** Empty for a plain sum. */
  parts: readonly FigurePart[];
}

/** Figures that are no sums of cost lines are made by rules of their own. */
type OwnRule =
  | 'job.quotedPrice'
  | 'job.workInProgress'
  | 'payback.outlay'
  | 'payback.costItem'
  | 'payback.remaining'
  | 'payback.netCash'
  | 'payback.pacePerWeek'
  | 'payback.otherJobs';

export type SummedFigure = Exclude<Extract<Figure, `job.${string}` | `payback.${string}`>, OwnRule>;

const money = (title: string, rule: string, category: CostCategory): LineFigure => ({
  title,
  rule,
  unit: 'money',
  signs: { [category]: 1 },
  parts: [],
});
const hours = (title: string, rule: string, category: CostCategory): LineFigure => ({
  ...money(title, rule, category),
  unit: 'hours',
});

const OPERATOR_LABOUR: FigurePart = {
  label: 'Operator’s labour',
  figure: 'payback.operatorLabour',
  category: 'labour',
};
const RUNNING: FigurePart = {
  label: 'Running cost per hour',
  figure: 'payback.running',
  category: 'running',
};

const JOB_COST: readonly FigurePart[] = [
  { label: 'Labour', figure: 'job.labour', category: 'labour' },
  { label: 'Overtime', figure: 'job.overtime', category: 'overtime' },
  { label: 'Machine', figure: 'job.machine', category: 'machine' },
  { label: 'Overhead', figure: 'job.overhead', category: 'overhead' },
  { label: 'Material', figure: 'job.material', category: 'material' },
  { label: 'Outside services', figure: 'job.outside', category: 'outside' },
];

const costSigns = (sign: 1 | -1): LineFigure['signs'] =>
  Object.fromEntries(JOB_COST.map(({ category }) => [category, sign]));

/** Every entry owes labour and, on a machine in service, running: their hours are the entries' hours. */
export const LINE_FIGURES: Readonly<Record<SummedFigure, LineFigure>> = {
  'job.hours': hours('Hours', RULES.hours, 'labour'),
  'job.machineHours': hours('Machine hours', RULES.machineHours, 'machine'),
  'job.labour': money('Labour', RULES.labour, 'labour'),
  'job.overtime': money('Overtime premium', RULES.overtime, 'overtime'),
  'job.machine': money('Machine cost', RULES.machine, 'machine'),
  'job.overhead': money('Overhead', RULES.overhead, 'overhead'),
  'job.material': money('Material', RULES.material, 'material'),
  'job.outside': money('Outside services', RULES.outside, 'outside'),
  'job.invoiced': money('Invoiced', RULES.invoiced, 'invoiced'),
  'job.earned': money('Earned by machines', RULES.earned, 'earned'),
  'job.total': {
    title: 'Cost',
    rule: RULES.jobTotal,
    unit: 'money',
    signs: costSigns(1),
    parts: JOB_COST,
  },
  'job.margin': {
    title: 'Margin',
    rule: RULES.margin,
    unit: 'money',
    signs: { invoiced: 1, ...costSigns(-1) },
    parts: [{ label: 'Invoiced', figure: 'job.invoiced', category: 'invoiced' }, ...JOB_COST],
  },
  'payback.hours': hours(
    'Hours',
    'The hours of all entries on the machine, billable or not, from its in-service date, each counted once.',
    'running',
  ),
  'payback.billableHours': hours(
    'Billable hours',
    'The hours of entries on the machine for billable jobs, from its in-service date, each counted once.',
    'earned',
  ),
  'payback.earned': money('Earned', RULES.earned, 'earned'),
  'payback.operatorLabour': money('Operator’s labour', RULES.operatorLabour, 'labour'),
  'payback.running': money('Running cost per hour', RULES.running, 'running'),
  'payback.runningCost': {
    title: 'Running cost',
    rule: RULES.runningCost,
    unit: 'money',
    signs: { labour: 1, running: 1 },
    parts: [OPERATOR_LABOUR, RUNNING],
  },
  'payback.earnedBack': {
    title: 'Earned back',
    rule: RULES.earnedBack,
    unit: 'money',
    signs: { earned: 1, labour: -1, running: -1 },
    parts: [{ label: 'Earned', figure: 'payback.earned', category: 'earned' }, OPERATOR_LABOUR, RUNNING],
  },
};

type BooksFigure = Extract<Figure, `books.${string}`>;

/** Totals of the books: the figures of jobs, and what went to overhead besides. */
export const BOOKS_LINE_FIGURES: Readonly<Record<BooksFigure, LineFigure>> = {
  'books.labour': LINE_FIGURES['job.labour'],
  'books.overtime': LINE_FIGURES['job.overtime'],
  'books.machine': LINE_FIGURES['job.machine'],
  'books.overhead': LINE_FIGURES['job.overhead'],
  'books.material': LINE_FIGURES['job.material'],
  'books.outside': LINE_FIGURES['job.outside'],
  'books.cost': {
    ...LINE_FIGURES['job.total'],
    parts: JOB_COST.map((part) => ({ ...part, figure: `books.${part.category}` as BooksFigure })),
  },
  'books.invoiced': LINE_FIGURES['job.invoiced'],
  'books.earned': LINE_FIGURES['job.earned'],
  'books.running': LINE_FIGURES['payback.running'],
};

/** The hours of labour lines and of entries without a wage, whose they may be. */
export const COSTED_HOURS = hours(
  'Hours in the costs',
  'The hours of the labour lines of the days, and of entries that have no wage on their day, as last rolled up.',
  'labour',
);

/** The premiums of one employee's week. */
export const OVERTIME_WEEK = money('Overtime premium', RULES.overtime, 'overtime');

/** What one issue or return of material came to. */
export const STOCK_ISSUE = money('Material', RULES.material, 'material');
