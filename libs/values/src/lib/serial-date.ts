import { D, type DecimalInput } from './decimal';
import { addDays, type LocalDate, toLocalDate } from './local-date';
import { accepted, type Parsed, refused } from './parsed';

/** The two ways in which a workbook counts days; its `date1904` flag says which. */
export type SerialSystem = '1900' | '1904';

const EXAMPLE = 'A date such as 2026-03-02 is expected here.';
// ISO/IEC 29500-1 (ECMA-376 part 1) 18.17.4: in the 1900 system day 1 is 1900-01-01, and day 60 stands for
// 29 February 1900, which never was, so that later days count from one day earlier. Both end at 9999-12-31.
const BEFORE_DAY_1_OF_1900 = toLocalDate('1899-12-31');
const BASE_AFTER_DAY_60 = toLocalDate('1899-12-30');
const DAY_0_OF_1904 = toLocalDate('1904-01-01');
const NEVER_A_DAY = 60;
const LAST_DAY: Readonly<Record<SerialSystem, number>> = { '1900': 2_958_465, '1904': 2_957_003 };

/**
 * Reads a spreadsheet's serial date; the time of day (the fraction) is dropped. A time without a date, 0 in the 1900
 * system, day 60 of it, negative serials and those after 9999 are refused.
 * Codes: `not_a_date`, `time_without_date`, `no_such_day`.
 * @throws RangeError if `serial` is not a finite number.
 */
export function dateFromSerial(serial: DecimalInput, system: SerialSystem): Parsed<LocalDate> {
  const exact = D(serial);
  const day = exact.floor().toNumber();
  if (exact.gt(0) && exact.lt(1)) {
    return refused('time_without_date', `This cell holds a time of day without a date. ${EXAMPLE}`);
  }
  const first = system === '1900' ? 1 : 0;
  if (day < first || day > LAST_DAY[system]) {
    return refused('not_a_date', `The number ${exact.toFixed()} is no date in this workbook. ${EXAMPLE}`);
  }
  if (system === '1904') return accepted(addDays(DAY_0_OF_1904, day));
  if (day === NEVER_A_DAY) {
    return refused('no_such_day', `This cell says 29 February 1900, a day that never was. ${EXAMPLE}`);
  }
  return accepted(addDays(day < NEVER_A_DAY ? BEFORE_DAY_1_OF_1900 : BASE_AFTER_DAY_60, day));
}
