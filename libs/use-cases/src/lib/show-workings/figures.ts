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
export type SummedFigure = Exclude<Figure, 'job.quotedPrice' | 'payback.outlay' | 'payback.remaining'>;

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

/** Every entry owes labour and, on a machine in service, running: their hours are the entries' hours. */
export const LINE_FIGURES: Readonly<Record<SummedFigure, LineFigure>> = {
  'job.hours': hours('Hours', RULES.hours, 'labour'),
  'job.machineHours': hours('Machine hours', RULES.machineHours, 'machine'),
  'job.labour': money('Labour', RULES.labour, 'labour'),
  'job.machine': money('Machine cost', RULES.machine, 'machine'),
  'job.overhead': money('Overhead', RULES.overhead, 'overhead'),
  'job.earned': money('Earned by machines', RULES.earned, 'earned'),
  'job.total': {
    title: 'Cost',
    rule: RULES.jobTotal,
    unit: 'money',
    signs: { labour: 1, machine: 1, overhead: 1 },
    parts: [
      { label: 'Labour', figure: 'job.labour', category: 'labour' },
      { label: 'Machine', figure: 'job.machine', category: 'machine' },
      { label: 'Overhead', figure: 'job.overhead', category: 'overhead' },
    ],
  },
  'payback.hours': hours(
    'Hours',
    'The hours of all entries on the machine, billable or not, from its in-service date, each counted once.',
    'running',
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
