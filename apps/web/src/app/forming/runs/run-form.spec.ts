import { type PressRun } from '@brakeven/contract';
import { sampleReference } from '../../testing/sample-reference';
import { toBendMaterial } from '../bend-material';
import { type FitFacts } from '../fit/fit-question';
import { toPresses } from '../press-tooling';
import { toRunForm, toRunInput } from './run-form';

const reference = sampleReference();
const factsIn = (units: 'us' | 'metric'): FitFacts => ({
  materials: reference.materials.map(toBendMaterial),
  gauges: [],
  presses: toPresses(reference),
  lineShare: 0.8,
  units,
});
const run: PressRun = {
  pressRunId: 'run-1',
  runOn: '2026-03-02',
  jobId: 'job-1',
  jobNumber: '2201',
  jobTitle: 'Hopper chute',
  machineId: 'm2',
  machine: 'Press 2',
  punchId: null,
  punch: null,
  dieOpeningId: 'opening-3',
  die: 'Four-way block',
  openingMm: '31.75',
  materialCode: 's275jr',
  material: 'S275JR',
  thicknessMm: '3.03784',
  bendLengthMm: '1015.33333',
  strokes: 120,
  pieces: 60,
  forceLowKn: '100',
  forceHighKn: '110',
  highestForceKn: '203.18631',
  forceUsedKn: '203.18631',
  ratedKn: null,
  ratingOf: null,
  share: null,
  isAboveLine: false,
  isGood: false,
  note: 'Shim left',
  entryId: 'entry-1',
  loggedBy: 'Jory Vance',
  voidedAt: null,
  voidedBy: null,
};

describe('toRunForm', () => {
  it.each(['us', 'metric'] as const)('sends a run that nobody changed back as it was, in %s', (units) => {
    const form = toRunForm(factsIn(units), '2026-03-04', run);
    expect(form.valid).toBe(true);
    expect(toRunInput(form, factsIn(units), run)).toEqual({
      jobId: 'job-1',
      machineId: 'm2',
      punchId: null,
      dieOpeningId: 'opening-3',
      materialCode: 's275jr',
      thicknessMm: '3.03784',
      bendLengthMm: '1015.33333',
      strokes: 120,
      pieces: 60,
      highestForceKn: '203.18631',
      runOn: '2026-03-02',
      isGood: false,
      note: 'Shim left',
      entryId: 'entry-1',
    });
  });

  it('shows a sheet in inches where inches hold it, else in the millimetres that it was kept in', () => {
    const { thickness, bendLength } = toRunForm(factsIn('us'), '2026-03-04', run).getRawValue();
    expect([thickness, bendLength]).toEqual(['0.1196 in', '1015.33333 mm']);
  });

  it('begins a new run today on the first press with a die, and asks for what is missing', () => {
    const form = toRunForm(factsIn('us'), '2026-03-04', null);
    expect(form.getRawValue()).toMatchObject({
      runOn: '2026-03-04',
      machine: 'P2',
      isGood: true,
      strokes: '',
    });
    expect(form.controls.strokes.valid).toBe(false);
    form.controls.strokes.setValue('1.5');
    expect(form.controls.strokes.errors).toEqual({
      words: 'Strokes are a whole number of 1 or more, such as 80.',
    });
  });
});
