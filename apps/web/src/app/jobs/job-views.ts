import { type JobSort, type SavedView, type ViewState } from '@brakeven/contract';
import { COST_COLUMNS, isMoneyColumn, toStandardColumns } from './job-columns';

/** A view that can be chosen: one that comes with the product, or one that somebody keeps. */
export interface JobView {
  id: string;
  name: string;
  state: ViewState;
  /** Own views can be replaced and removed. */
  savedViewId: string | null;
}

const LATEST: Pick<ViewState, 'sort' | 'direction' | 'filter'> = {
  sort: 'lastWorkedOn',
  direction: 'desc',
  filter: {},
};

/** The views that come with the product, the standard one first. */
export function toBuiltInViews(withMoney: boolean, isNarrow = false): JobView[] {
  const view = (id: string, name: string, columns: readonly JobSort[], change: Partial<ViewState> = {}) => ({
    id,
    name,
    state: { columns: [...columns], ...LATEST, ...change },
    savedViewId: null,
  });
  const standard = view('standard', 'All jobs', toStandardColumns(withMoney, isNarrow));
  if (!withMoney) return [standard];
  return [
    standard,
    view('cost', 'Cost by category', COST_COLUMNS),
    view('loss', 'Invoiced, least margin first', toStandardColumns(true, isNarrow), {
      sort: 'margin',
      direction: 'asc',
      filter: { status: 'invoiced' },
    }),
  ];
}

/** A kept view as it can be chosen, without what its owner may no longer see. */
export function toOwnView({ savedViewId, name, state }: SavedView, withMoney: boolean): JobView {
  const columns = state.columns.filter((id) => withMoney || !isMoneyColumn(id));
  const isSortSeen = state.sort === null || withMoney || !isMoneyColumn(state.sort);
  return {
    id: savedViewId,
    name,
    state: {
      ...state,
      columns: columns.length > 0 ? columns : toStandardColumns(withMoney),
      sort: isSortSeen ? state.sort : LATEST.sort,
    },
    savedViewId,
  };
}
