import { aboveZero, needed, optional, type SetupSheetPlan } from './setup-plan';

const SIZE_UNIT = 'The unit stands in the header: (in), (ft) or (mm).';
const WEIGHT_UNIT = 'The unit stands in the header: (lb) or (kg).';

/** What is in stock, and what jobs draw from it. */
export const STOCK_PLANS: readonly SetupSheetPlan[] = [
  {
    list: 'materials',
    sheet: 'Materials',
    uniqueBy: ['name'],
    help: 'One row for each material that is kept in stock.',
    columns: [
      {
        ...needed('name', 'Name', 'label', '11 ga hot-rolled', 'As the other sheets name it.'),
        alsoHeaded: ['Material'],
      },
      optional('grade', 'Grade', 'label', 'A1011', 'As it is ordered; it tells which gauge table applies.'),
      optional(
        'form',
        'Form',
        'materialForm',
        'sheet',
        'One of: sheet, plate, bar, tube, other; blank means sheet.',
      ),
      {
        ...optional(
          'thickness',
          'Thickness or gauge',
          'thickness',
          '11 ga',
          'A gauge with ga behind it, a fraction as text such as 3/16, or a number in the unit of the header: (in) or (mm).',
        ),
        alsoHeaded: ['Thickness', 'Gauge'],
      },
      optional(
        'densityKgM3',
        'Density',
        'density',
        '0.2836',
        'To weigh sheets and blanks by their size. The unit stands in the header: (lb/in³), (g/cm³) or (kg/m³).',
      ),
      optional(
        'tensileStrengthMpa',
        'Tensile strength',
        'strength',
        '60',
        'For bending force. The unit stands in the header: (ksi), (psi) or (MPa).',
      ),
      optional(
        'recoveryPricePerKg',
        'Recovery price',
        'pricePerWeight',
        '0.11',
        'What scrap of it fetches; the header says per lb or per kg. Blank means 0.',
      ),
    ],
  },
  {
    list: 'sheetLots',
    sheet: 'Sheet lots',
    uniqueBy: ['lot'],
    help: 'What came in, one row for each lot. State the weight, or the number of sheets with length and width.',
    columns: [
      { ...needed('lot', 'Lot', 'label', 'L-118', 'A number of its own.'), alsoHeaded: ['Lot no'] },
      needed('material', 'Material', 'label', '11 ga hot-rolled', 'As on the Materials sheet.'),
      {
        ...needed('receivedOn', 'Received', 'date', '2026-02-03', 'Day on which it came in.'),
        alsoHeaded: ['Date'],
      },
      optional('vendor', 'Vendor', 'label', 'Millrace Steel', 'Who sold it.'),
      aboveZero(optional('sheets', 'Sheets', 'count', '12', 'How many.')),
      optional('sheetLengthMm', 'Sheet length', 'length', '120', SIZE_UNIT),
      optional('sheetWidthMm', 'Sheet width', 'length', '48', SIZE_UNIT),
      optional('weightKg', 'Weight', 'mass', '2340', `Of the whole lot. ${WEIGHT_UNIT}`),
      aboveZero(needed('cost', 'Cost', 'money', '1684.80', 'Of the whole lot, without freight.')),
      optional('freight', 'Freight', 'money', '95.00', 'What it cost to get it here. Blank means 0.'),
    ],
  },
  {
    list: 'issues',
    sheet: 'Issues',
    uniqueBy: [],
    help: 'What jobs drew from stock and gave back. State the weight, or pieces with the size of a blank, or whole sheets.',
    columns: [
      needed('date', 'Date', 'date', '2026-02-05', 'Day on which it left the rack.'),
      needed('job', 'Job', 'label', '2041', 'Number of the job.'),
      needed('material', 'Material', 'label', '11 ga hot-rolled', 'As on the Materials sheet.'),
      {
        ...optional(
          'kind',
          'Kind',
          'issueKind',
          'issue',
          'issue, or return for what came back; blank means issue.',
        ),
        ifBlank: 'issue',
      },
      aboveZero(
        optional(
          'sheets',
          'Sheets',
          'count',
          '2',
          'Whole sheets, each as large as the blank size says, or as a sheet of the last lot received by then.',
        ),
      ),
      aboveZero(optional('pieces', 'Pieces', 'count', '24', 'Blanks cut.')),
      optional('blankLengthMm', 'Blank length', 'length', '18.5', SIZE_UNIT),
      optional('blankWidthMm', 'Blank width', 'length', '9.25', SIZE_UNIT),
      optional('weightKg', 'Weight', 'mass', '142.5', `If it was weighed. ${WEIGHT_UNIT}`),
      optional('note', 'Note', 'label', 'Remnant back on the rack', 'In words.'),
    ],
  },
];
