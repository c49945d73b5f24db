import { type MachineCostKind } from '@brakeven/contract';

/** What the parts of a landed cost are called; the order is that of the list to choose from. */
export const COST_KIND_WORDS: Record<MachineCostKind, string> = {
  price: 'Price',
  freight: 'Freight',
  rigging: 'Rigging',
  electrical: 'Electrical',
  tooling: 'Tooling',
  installation: 'Installation',
  training: 'Training',
  other: 'Other',
};

export const COST_KIND_OPTIONS = Object.entries(COST_KIND_WORDS).map(([value, label]) => ({ value, label }));
