import { type TimesheetCheck, type TimesheetImported } from '@brakeven/contract';
import { printPairs, printTable } from '../print-table';

export type Taken = TimesheetCheck | TimesheetImported;

/** What came of a timesheet, for people: the sums, what the caller can say better, and every problem. */
export function toTakenText(taken: Taken): string {
  const added = 'entriesAdded' in taken;
  const { controlTotal } = taken;
  const counts = printPairs([
    ['Rows read', `${taken.rowsRead}, ${taken.hoursRead} hours`],
    [
      added ? 'Added' : 'Ready',
      added
        ? `${taken.entriesAdded}, ${taken.hoursAdded} hours`
        : `${taken.entriesReady}, ${taken.hoursReady} hours`,
    ],
    ['Already there', `${taken.alreadyThere}, ${taken.hoursAlreadyThere} hours`],
    ['Refused', toRefusedWords(taken)],
    ...(controlTotal ? [['Total in the file', toControlWords(controlTotal)] as const] : []),
    ...(added && taken.importId ? [['Import', taken.importId] as const] : []),
  ]);
  const parts = [counts, toImportedWords(taken), ...listNotes(taken), toProblemTable(taken)];
  return parts.filter((part) => part !== '').join('\n\n');
}

/** Hours that cannot be read are in no sum; they are never 0. */
function toRefusedWords({ refused, refusedWithoutHours, hoursRefused }: Taken): string {
  if (refusedWithoutHours === 0) return `${refused}, ${hoursRefused} hours`;
  if (refusedWithoutHours === refused) return `${refused}, hours cannot be read`;
  return `${refused}, ${hoursRefused} hours and those of ${refusedWithoutHours} that cannot be read`;
}

/** What the caller can say better, with the option that says it. */
function listNotes({ unusedColumns, unreadDates }: Taken): string[] {
  const unused = unusedColumns.map(
    ({ message, column }) =>
      `Note: ${message} To use it, say which field it holds: --column <field>=${column}`,
  );
  const orders = (unreadDates?.offers ?? []).map(
    ({ dateFormat, text, date }) => `  --date-format '${dateFormat}'   ${text} is ${date}`,
  );
  if (orders.length === 0) return unused;
  const lead = `Note: Text dates are not read as they are (first in ${unreadDates?.cells[0]}). All of them are read with`;
  return [...unused, [orders.length === 1 ? `${lead}:` : `${lead} one of:`, ...orders].join('\n')];
}

function toControlWords({ hours, agrees, difference }: NonNullable<Taken['controlTotal']>): string {
  return agrees ? `${hours} hours, agrees` : `${hours} hours, differs by ${difference}`;
}

function toImportedWords({ alreadyImported }: Taken): string {
  if (!alreadyImported) return '';
  const { importedAt, importedBy, importId } = alreadyImported;
  return `This file was already imported at ${importedAt} by ${importedBy} (${importId}).`;
}

function toProblemTable({ problems }: Taken): string {
  if (problems.length === 0) return 'No problems.';
  return printTable(problems, [
    { title: 'Cell', of: ({ sheet, cell }) => `${sheet}!${cell}` },
    { title: 'Weight', of: ({ severity }) => severity },
    { title: 'Problem', of: ({ message }) => message },
  ]);
}
