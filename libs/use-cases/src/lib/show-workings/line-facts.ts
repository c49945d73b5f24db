import { type FigureRef, type LineFacts, type LineUnit } from '@brakeven/contract';
import { type LineFactRow } from '@brakeven/database';
import { roundHalfUp, D } from '@brakeven/values';

const UNITS: Readonly<Record<LineFactRow['sourceKind'], LineUnit>> = {
  time_entry: 'hours',
  material_issue: 'kg',
  outside_service: 'each',
  invoice: 'each',
};

/** What a line says about itself, whatever kind of row it was made from. */
export function toLineFacts(row: LineFactRow): LineFacts {
  const { postedOn, workedOn, takesBackOn, sourceKind, quantity } = row;
  return {
    postedOn,
    isLate: postedOn !== workedOn,
    takesBackOn,
    label: toLabel(row),
    detail: toDetail(row),
    quantity: roundHalfUp(D(quantity), 4).toFixed(4),
    unit: UNITS[sourceKind],
  };
}

/** A line's id: a row may have lines of one category on several days, those that take back others. */
export function toLineId({ postedOn, sourceId, category }: LineFactRow): string {
  return `${postedOn}.${sourceId}.${category}`;
}

/** What tells more of a line than its rate: the week of a premium, the stock that an issue came from. */
export function toLineFigure({ category, employeeId, sourceId, workedOn }: LineFactRow): FigureRef | null {
  if (category === 'overtime' && employeeId !== null) {
    return { figure: 'overtime.week', employeeId, from: workedOn };
  }
  return category === 'material' ? { figure: 'stock.issue', issueId: sourceId } : null;
}

function toLabel({
  sourceKind,
  employee,
  material,
  vendor,
  invoiceKind,
  invoiceNumber,
}: LineFactRow): string {
  switch (sourceKind) {
    case 'material_issue':
      return material ?? 'Material';
    case 'outside_service':
      return vendor || 'Outside service';
    case 'invoice':
      return `${invoiceKind === 'credit-note' ? 'Credit note' : 'Invoice'} ${invoiceNumber ?? ''}`.trim();
    default:
      return employee ?? 'Somebody no longer listed';
  }
}

function toDetail({ issueKind, sheets, pieces, description }: LineFactRow): string | null {
  const words = [
    ...(issueKind === 'return' ? ['returned to stock'] : []),
    ...(sheets === null ? [] : [countOf(sheets, 'sheet')]),
    ...(pieces === null ? [] : [countOf(pieces, 'piece')]),
    ...(description === null ? [] : [description]),
  ];
  return words.length === 0 ? null : words.join(', ');
}

function countOf(count: number, word: string): string {
  return `${count} ${word}${count === 1 ? '' : 's'}`;
}
