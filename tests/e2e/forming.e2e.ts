import { eventually } from './browser/eventually';
import { type Visitor, Visitors } from './browser/visitors';
import { FormDialog } from './pages/form-dialog';
import { chooseOption, FormingPage } from './pages/forming-page';

const PRESS = 'Press 2';
const PUNCH = 'Journey punch';
const DIE = 'Journey die';

describe('A bend is settled before metal is cut', () => {
  let visitors: Visitors;
  let lead: Visitor;
  let forming: FormingPage;

  beforeAll(async () => {
    visitors = await Visitors.launch();
    lead = await visitors.visitAs('lead');
    forming = new FormingPage(lead.page);
  });
  afterAll(() => visitors.close());

  it('the lead enters a punch and a die of a press', async () => {
    await forming.open('tooling');
    await forming.addTool(PRESS, 'punch', { Name: PUNCH, 'Nose radius': '1/16', Angle: '85' });
    await forming.addTool(PRESS, 'die', {
      Name: DIE,
      Opening: '1 1/8',
      Angle: '85',
      'Shoulder radius': '0.08',
    });
    expect(lead.complaints).toEqual([]);
  });

  it('finds the opening for a sheet, and the address holds the question', async () => {
    await forming.open('fit');
    await forming.field('Machine').selectOption({ label: PRESS });
    await forming.field('Thickness').fill('10 ga');
    await forming.field('Bend length').fill("4'");
    await eventually(async () =>
      expect(await forming.answer.textContent()).toMatch(/^\s*It fits: use the .+\sin opening/),
    );
    const row = forming.openingRow('1.125 in', DIE);
    await row.getByRole('button').click();
    expect(await row.innerText()).toContain(DIE);
    await eventually(async () => expect(lead.page.url()).toContain('length='));
    await lead.page.getByRole('heading', { name: 'How the 1.125 in row was made' }).waitFor();

    const { page } = await visitors.visitAs('operator');
    await page.goto(lead.page.url());
    await page.getByRole('heading', { name: 'How the 1.125 in row was made' }).waitFor();
    expect(await new FormingPage(page).answer.textContent()).toBe(await forming.answer.textContent());
  });

  it('refuses what cannot be bent with the range and an example', async () => {
    await forming.field('Inside angle').fill('10');
    await lead.page.locator('mat-error').filter({ hasText: '20 to 175 degrees' }).waitFor();
    expect(await lead.page.locator('app-fit-table').count()).toBe(0);
  });

  it('says what is missing until there are three trial bends, then answers both ways', async () => {
    await forming.open('depth');
    await forming.field('Machine').selectOption({ label: PRESS });
    await chooseOption(forming.field('Punch'), PUNCH);
    await chooseOption(forming.field('Die opening'), DIE);
    await lead.page.getByRole('heading', { name: 'Not enough trial bends yet' }).waitFor();
    await forming.noteTrial('0.417', '125.1');
    await forming.noteTrial('0.517', '102.2');
    await lead.page.getByText('2 of the 3 trial bends needed are there').waitFor();
    await forming.noteTrial('0.600', '84.9');
    await forming.field('Inside angle').fill('95');
    await eventually(async () =>
      expect(await forming.answer.textContent()).toMatch(/^\s*0\.5[45]\d\sin for 95°\s*$/),
    );
    await forming.field('Or the angle at a reading').fill('0.517');
    await lead.page
      .locator('.back-way')
      .filter({ hasText: /10[12](\.\d)?° at 0\.517/ })
      .waitFor();
    await forming.field('Inside angle').fill('30');
    await lead.page.getByText(/answers are given from .* and not for 30\./).waitFor();
    expect(lead.complaints).toEqual([]);
  });

  it('the operator logs a run, and the set-up card shows what it used', async () => {
    const operator = await visitors.visitAs('operator');
    const page = new FormingPage(operator.page);
    await page.open('runs');
    await operator.page.getByRole('button', { name: 'Log a run' }).first().click();
    const form = new FormDialog(operator.page);
    const job = form.dialog.getByLabel('Job');
    await job.locator('option').nth(1).waitFor({ state: 'attached' });
    await job.selectOption({ index: 1 });
    const jobId = await job.inputValue();
    await form.dialog.getByLabel('Machine').selectOption({ label: PRESS });
    await chooseOption(form.dialog.getByLabel('Die opening'), DIE);
    await form.fill({
      Thickness: '10 ga',
      'Bend length': '48',
      Strokes: '40',
      Pieces: '20',
      'Highest force shown': '36',
    });
    await form.dialog.getByText(/The rules expect [\d.]+–[\d.]+\sUS tons/).waitFor();
    await form.submit('Log the run');
    await operator.page.getByText(/It took \d+\s% of the rating/).waitFor();
    await page.open('setup-card', `?job=${jobId}`);
    await operator.page.getByText(`1.125 in opening on ${DIE}, 85°`).waitFor();
    await operator.page.getByText(/the gauge showed 36\sUS tons/).waitFor();
    expect(operator.complaints).toEqual([]);
  });

  it('the lead sees the run among all with its share of the rating', async () => {
    await forming.open('runs', '?search=Journey');
    await lead.page
      .getByRole('group', { name: 'Press runs' })
      .getByText(/^\d+\s% of (press|die|punch)$/)
      .first()
      .waitFor();
    expect(lead.complaints).toEqual([]);
  });

  it('the lead corrects the run, which begins as it was logged', async () => {
    await forming.open('runs', '?search=Journey');
    const grid = lead.page.getByRole('group', { name: 'Press runs' });
    await grid.getByRole('button', { name: 'Correct' }).first().click();
    const form = new FormDialog(lead.page);
    expect(await form.dialog.getByLabel('Strokes').inputValue()).toBe('40');
    expect(await form.dialog.getByLabel('Highest force shown').inputValue()).toBe('36');
    await form.fill({ Strokes: '4321' });
    await form.submit('Save');
    await lead.page.getByText('The run is corrected.').waitFor();
    await grid.getByText('4,321', { exact: true }).waitFor();
    expect(lead.complaints).toEqual([]);
  });
});
