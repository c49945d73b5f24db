import { type FormingReference, type PressRun, type PressRunPage } from '@brakeven/contract';
import { readProblem, startTestApi, type TestApi, type Visitor } from './test-api';

let api: TestApi;
let lead: Visitor;
let operator: Visitor;
let machineId: string;
beforeAll(async () => {
  api = await startTestApi();
  machineId = await api.shop.addMachine({ code: 'P1', ratedForceKn: '222.41108' });
  lead = await api.signIn('lead');
  operator = await api.signIn('operator');
});
afterAll(() => api.close());

const punch = { name: 'Gooseneck', noseRadiusMm: '0.8', angle: '85', forceLimitKnPerM: '600' };
const die = { name: 'Block', openings: [{ openingMm: '25.4', angle: '85', shoulderRadiusMm: '2.5' }] };

describe('forming over the API', () => {
  it('lets a lead keep tools, and an operator read them and nothing of money', async () => {
    expect((await lead.send('post', `/machines/${machineId}/punches`, punch)).status).toBe(200);
    expect((await lead.send('post', `/machines/${machineId}/dies`, die)).status).toBe(200);
    const response = await operator.send('get', '/forming/reference');
    const reference = response.body as FormingReference;
    expect(reference).toMatchObject({ punches: [punch], dies: [{ name: 'Block' }], forceLinePercent: '80' });
    expect(response.text).not.toMatch(/rate(?!dForce)|cost|outlay|price/i);
    expect((await operator.send('post', `/machines/${machineId}/punches`, punch)).status).toBe(403);
  });

  it.each<[string, object, string, string]>([
    ['punches', { ...punch, noseRadiusMm: '-1' }, 'noseRadiusMm', 'negative'],
    ['punches', { ...punch, noseRadiusMm: '501' }, 'noseRadiusMm', 'such as 1/16 in'],
    ['punches', { ...punch, angle: '0' }, 'angle', 'such as 85'],
    ['dies', { ...die, openings: [] }, 'openings', 'at least one'],
    ['dies', { ...die, openings: [{ openingMm: 'NaN' }] }, 'openings.0.openingMm', 'for example'],
    [
      'dies',
      { ...die, openings: [{ openingMm: '16' }, { openingMm: '16.0' }] },
      'openings.1.openingMm',
      'already',
    ],
  ])('refuses %s with the field, the range and an example: %j', async (path, body, field, words) => {
    const problem = readProblem(await lead.send('post', `/machines/${machineId}/${path}`, body));
    expect(problem).toMatchObject({ code: 'invalid_input', status: 400 });
    expect(problem.issues).toContainEqual(
      expect.objectContaining({ field, message: expect.stringContaining(words) }),
    );
  });

  it('lets an operator log, see and correct a run, with those of others out of reach', async () => {
    const jobId = await api.shop.addJob({ number: '1042' });
    const { dies } = (await operator.send('get', '/forming/reference')).body as FormingReference;
    const run = {
      ...{ jobId, machineId, dieOpeningId: dies[0]?.openings[0]?.dieOpeningId, materialCode: 'mild-steel' },
      ...{ thicknessMm: '3.175', bendLengthMm: '600', strokes: 4, pieces: 2 },
    };
    const logged = (await operator.send('post', '/press-runs', run)).body as PressRun;
    const led = (await lead.send('post', '/press-runs', run)).body as PressRun;
    const list = async (visitor: Visitor) =>
      ((await visitor.send('get', '/press-runs?sort=share')).body as PressRunPage).items;
    expect((await list(operator)).map(({ pressRunId }) => pressRunId)).toEqual([logged.pressRunId]);
    expect(await list(lead)).toHaveLength(2);
    const bad = await operator.send('post', '/press-runs', { ...run, bendLengthMm: '0' });
    expect(readProblem(bad).issues).toContainEqual(
      expect.objectContaining({ field: 'bendLengthMm', message: expect.stringContaining('4 ft') }),
    );
    const change = { ...run, pieces: 3 };
    expect((await operator.send('patch', `/press-runs/${led.pressRunId}`, change)).status).toBe(404);
    const corrected = await operator.send('patch', `/press-runs/${logged.pressRunId}`, change);
    expect(corrected.body).toMatchObject({ pieces: 3, loggedBy: logged.loggedBy });
    expect(await list(operator)).toEqual([corrected.body]);
    expect((await operator.send('post', `/press-runs/${logged.pressRunId}/restore`, {})).status).toBe(409);
    expect((await operator.send('get', `/jobs/${jobId}/setup-card`)).body).toMatchObject({
      jobNumber: '1042',
      runs: [{ dieAngle: '85' }],
    });
  });
});
