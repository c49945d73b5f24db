import { DATE_FORMATS } from '@brakeven/values';
import { type RawCell } from './sheet-file';
import { readDateCell, type TextForms } from './timesheet-cells';
import { type DateOrderOffer, type UnreadTextDates } from './timesheet-row';

/**
 * Text dates that are not read as declared, with every order that would read all text dates of the column, and what
 * the first of them would become; null when all are read. Which order it is stays the user's to say: 02/03/2026 is
 * a day in two of them.
 */
export function findUnreadDates(
  dates: readonly (RawCell | undefined)[],
  forms: TextForms,
): UnreadTextDates | null {
  const texts = dates.filter((cell): cell is RawCell => cell?.kind === 'text');
  const unread = texts.filter((cell) => !readDateCell(cell, forms).ok);
  if (unread.length === 0) return null;
  return { cells: unread.map(({ address }) => address), offers: listOffers(texts, forms) };
}

function listOffers(texts: readonly RawCell[], forms: TextForms): DateOrderOffer[] {
  const [first] = texts;
  return DATE_FORMATS.flatMap((dateFormat) => {
    const readAs = (cell: RawCell | undefined) => readDateCell(cell, { ...forms, dateFormat });
    const date = readAs(first);
    if (!first || !date.ok || date.value === null || !texts.every((cell) => readAs(cell).ok)) return [];
    return [{ dateFormat, text: first.text, date: date.value }];
  });
}
