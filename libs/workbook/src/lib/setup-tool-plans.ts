import { needed, optional, type SetupSheetPlan } from './setup-plan';

const SIZE_UNIT = 'The unit stands in the header: (in), (ft) or (mm).';
const LIMIT_UNIT =
  'As stamped on the tool or in its papers. The unit stands in the header: (tons/ft), (kN/m) or (tonnes/m).';

/** What is set up in a press. */
export const TOOL_PLANS: readonly SetupSheetPlan[] = [
  {
    list: 'punches',
    sheet: 'Punches',
    uniqueBy: ['machine', 'punch'],
    help: 'One row for each punch of a press.',
    columns: [
      needed('machine', 'Machine', 'label', 'P2', 'Code of the press.'),
      { ...needed('punch', 'Punch', 'label', 'Gooseneck 88', 'As people call it.'), alsoHeaded: ['Name'] },
      needed('noseRadiusMm', 'Nose radius', 'radius', '0.0315', `0 if it is sharp. ${SIZE_UNIT}`),
      optional('angle', 'Angle', 'angle', '88', 'Of the tool, in degrees.'),
      optional('lengthMm', 'Length', 'length', '72', SIZE_UNIT),
      optional('forceLimitKnPerM', 'Force limit per length', 'forcePerLength', '20', LIMIT_UNIT),
    ],
  },
  {
    list: 'dies',
    sheet: 'Dies',
    uniqueBy: ['machine', 'die', 'openingMm'],
    help: 'One row for each opening of a die; a block with several openings takes several rows.',
    columns: [
      needed('machine', 'Machine', 'label', 'P2', 'Code of the press.'),
      { ...needed('die', 'Die', 'label', 'Block 1', 'As people call it.'), alsoHeaded: ['Name'] },
      needed(
        'openingMm',
        'Opening',
        'length',
        '1',
        `Between the points where the shoulder arcs meet the top of the die. ${SIZE_UNIT}`,
      ),
      optional('angle', 'Angle', 'angle', '85', 'Of the opening, in degrees.'),
      optional(
        'shoulderRadiusMm',
        'Shoulder radius',
        'radius',
        '0.125',
        `Ram depths are fitted with it. ${SIZE_UNIT}`,
      ),
      optional('lengthMm', 'Length', 'length', '72', `Of the die; on one of its rows at least. ${SIZE_UNIT}`),
      optional(
        'forceLimitKnPerM',
        'Force limit per length',
        'forcePerLength',
        '20',
        `Of the die; on one of its rows at least. ${LIMIT_UNIT}`,
      ),
    ],
  },
];
