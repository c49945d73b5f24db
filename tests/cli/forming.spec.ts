import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { runCli, runJson } from './run-cli';

jest.setTimeout(60_000);

const withoutDatabase = { DATABASE_URL: '', DATABASE_OWNER_URL: '' };
let folder: string;

beforeAll(async () => {
  folder = await mkdtemp(join(tmpdir(), 'brakeven-forming-'));
});
afterAll(() => rm(folder, { recursive: true }));

const FORCE = [
  ...['forming', 'force', '--material', 'mild-steel', '--thickness', '2mm'],
  ...['--length', '3 rods', '--opening', '16'],
];

describe('forming at the command line', () => {
  it('answers a force in the unit of the length that is given first', async () => {
    const metric = ['forming', 'force', '--length', '1200mm', '--opening', '1in', '--thickness', '10ga'];
    const { code, json } = await runJson(...metric, '--material', 'mild-steel');
    expect(code).toBe(0);
    expect(json).toMatchObject({
      unit: 'kN',
      lengthUnit: 'mm',
      opening: 25.4,
      openingOverThickness: expect.closeTo(7.434944, 6),
      rules: [{ rule: 'shop-575' }, { rule: 'oehler' }],
    });
    // F[N] = 660.7476 · t² · L / V is the 575 rule in SI, all lengths in mm.
    expect(json).toMatchObject({ forceHigh: expect.closeTo((0.6607476 * 3.4163 ** 2 * 1200) / 25.4, 3) });
  });

  it('refuses a unit that it does not know with exit code 1, for programs and for people', async () => {
    const { code, stdout, stderr } = await runCli([...FORCE, '--json'], withoutDatabase);
    expect(code).toBe(1);
    expect(JSON.parse(stdout)).toMatchObject({
      error: { code: 'invalid_input', issues: [{ field: 'length', code: 'unknown_unit' }] },
    });
    expect(stderr).toContain("'rods' is not a unit known here");
  });

  it('answers a blank without any database', async () => {
    const { code, stdout } = await runCli(
      [
        ...['forming', 'blank', '--flanges', '40mm,60mm,40mm', '--angles', '90,90'],
        ...['--thickness', '2mm', '--radius', '2mm', '--k', '0.446', '--json'],
      ],
      withoutDatabase,
    );
    expect(code).toBe(0);
    expect(JSON.parse(stdout)).toMatchObject({
      flat: expect.closeTo(140 - 2 * 3.457257, 5),
      deductions: [expect.closeTo(3.457257, 6), expect.closeTo(3.457257, 6)],
      gauge: [expect.closeTo(40 - 3.457257 / 2, 5), expect.closeTo(60 - 3.457257 / 2, 5)],
      unit: 'mm',
    });
  });

  it('answers a depth from a file, and says which file is missing', async () => {
    const trials = join(folder, 'trials.csv');
    // Travel of the check values (V 16, t 2, Ri 2.56, rd 2) less t, the zero at 100: no springback.
    const rows = ['16,2,1,2,103.282759,90', '16,2,1,2,101.603967,120', '16,2,1,2,105.296406,60'];
    const header = 'opening (mm),thickness (mm),punchRadius (mm),shoulderRadius (mm),depth (mm),angle (deg)';
    await writeFile(trials, [header, ...rows].join('\n'));
    const depth = await runJson('forming', 'depth', '--trials', trials, '--angle', '90');
    expect(depth).toMatchObject({
      code: 0,
      json: {
        depth: expect.closeTo(103.282759, 3),
        springback: expect.closeTo(0, 2),
        datum: expect.closeTo(100, 2),
      },
    });
    const missing = await runJson('forming', 'depth', '--trials', join(folder, 'none.csv'), '--angle', '90');
    expect(missing.code).toBe(2);
    const both = await runJson('forming', 'depth', '--trials', trials, '--angle', '90', '--at-depth', '3mm');
    expect(both.code).toBe(2);
  });

  it('shows people the figures with the cautions', async () => {
    const { code, stdout } = await runCli(
      ['forming', 'force', '--material', 'a36', '--thickness', '1/4', '--length', "4'", '--opening', '2"'],
      withoutDatabase,
    );
    expect(code).toBe(0);
    expect(stdout).toMatch(/Force +90 to 95.833 US ton/);
    expect(stdout).toContain('The rating plates of the press, the punch and the die decide.');
  });
});
