import { type PressRun } from '@brakeven/contract';
import { type GridColumn } from '@brakeven/ui';
import { type UnitSystem } from '@brakeven/values';
import { toForceBandNumbers, toForceNumber, toPercentWords, toSizeWords } from '../forming-words';

/** Who looks at the runs, and what they may do with one. */
export interface RunView {
  units: UnitSystem;
  canOpenJobs: boolean;
  isNarrow: boolean;
  correctRun: (run: PressRun) => void;
  voidRun: (run: PressRun) => void;
}

type RunColumn = GridColumn<PressRun>;

/** The columns of the press runs: force observed beside force computed, and the share of the rating. */
export function toRunColumns(view: RunView): RunColumn[] {
  const isMetric = view.units === 'metric';
  const size = (millimetres: string) => toSizeWords(Number(millimetres), view.units);
  const columns: RunColumn[] = [
    { id: 'runOn', header: 'Run on', kind: 'date', value: (run) => run.runOn, isSortable: true, width: 106 },
    {
      id: 'job',
      header: 'Job',
      value: (run) => `${run.jobNumber} ${run.jobTitle}`,
      href: (run) => (view.canOpenJobs ? `/jobs/${run.jobId}` : null),
      isSortable: true,
      minWidth: 92,
      flex: 3,
    },
    { id: 'machine', header: 'Machine', value: (run) => run.machine, isSortable: true, width: 70 },
    {
      id: 'material',
      header: 'Material',
      value: (run) => `${size(run.thicknessMm)} ${toShortName(run.material)}`,
      isSortable: true,
      minWidth: 120,
      flex: 4,
    },
    {
      id: 'openingMm',
      header: 'Opening',
      value: (run) => size(run.openingMm),
      isSortable: true,
      width: 70,
    },
    {
      id: 'bendLengthMm',
      header: 'Length',
      value: (run) => size(run.bendLengthMm),
      isSortable: true,
      width: isMetric ? 84 : 74,
    },
    {
      id: 'strokes',
      header: 'Strokes',
      kind: 'count',
      value: (run) => run.strokes,
      isSortable: true,
      width: 66,
    },
    {
      id: 'pieces',
      header: 'Pieces',
      kind: 'count',
      value: (run) => run.pieces,
      isSortable: true,
      width: 60,
    },
    {
      id: 'computed',
      header: 'Computed',
      value: (run) => toForceBandNumbers(Number(run.forceLowKn), Number(run.forceHighKn), view.units),
      width: isMetric ? 100 : 88,
    },
    {
      id: 'forceUsedKn',
      header: 'Shown',
      value: (run) =>
        run.highestForceKn === null ? null : toForceNumber(Number(run.highestForceKn), view.units),
      isSortable: true,
      width: 60,
    },
    toShareColumn(view),
    {
      id: 'isGood',
      header: 'Good',
      value: (run) => (run.isGood ? 'yes' : 'no'),
      tone: (run) => (run.isGood ? null : 'loss'),
      width: 54,
    },
  ];
  return [...columns.filter(({ id }) => !view.isNarrow || NARROW.includes(id)), toActions(view)];
}

/** A material without the standard that it is delivered by. */
function toShortName(material: string): string {
  return material.replace(/,.*$/, '');
}

/** On a telephone: what was bent, and what it took. */
const NARROW = ['runOn', 'job', 'share'];

function toShareColumn({ isNarrow }: RunView): RunColumn {
  const of = ({ ratingOf }: PressRun) => (isNarrow ? '' : ` of ${ratingOf}`);
  return {
    id: 'share',
    header: isNarrow ? 'Force' : 'Of the rating',
    value: (run) => (run.share === null ? 'no rating' : `${toPercentWords(run.share)}${of(run)}`),
    tone: (run) => toShareTone(run),
    isSortable: true,
    width: isNarrow ? 88 : 112,
  };
}

function toShareTone({ share, isAboveLine }: PressRun): 'loss' | 'plan' | null {
  if (share !== null && share > 1) return 'loss';
  return isAboveLine ? 'plan' : null;
}

function toActions({ correctRun, voidRun }: RunView): RunColumn {
  return {
    id: 'actions',
    header: '',
    value: () => null,
    actions: (run) => [
      { label: 'Correct', run: () => correctRun(run) },
      { label: 'Void', run: () => voidRun(run) },
    ],
    width: 128,
  };
}
