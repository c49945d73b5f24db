import { type Estimate } from '@brakeven/contract';
import { type Test } from 'supertest';
import { readProblem, startTestApi, type TestApi, type Visitor } from './test-api';

let api: TestApi;
let owner: Visitor;
let bookkeeper: Visitor;
let path: string;
beforeAll(async () => {
  api = await startTestApi();
  owner = await api.signIn('owner');
  bookkeeper = await api.signIn('bookkeeper');
  path = `/jobs/${await api.shop.addJob({ number: '2231' })}/estimate`;
});
afterAll(() => api.close());

const toInput = (amount: string) => ({
  estimatedOn: '2026-05-01',
  scrapAllowancePercent: '0',
  marginPercent: '20',
  lines: [{ kind: 'outside', amount, description: 'Powder coat' }],
});
const load = async (visitor: Visitor) => {
  const { body, headers } = await visitor.send('get', path);
  return { estimate: (body as { estimate: Estimate | null }).estimate, version: headers['etag'] ?? '' };
};
const save = (visitor: Visitor, version: string, amount: string): Test =>
  visitor.open('patch', path).set('If-Match', version).send(toInput(amount));

describe('an estimate that two people have open', () => {
  it('is saved by the first, and not lost to the second', async () => {
    const [mine, theirs] = [await load(owner), await load(bookkeeper)];
    expect(mine).toEqual({ estimate: null, version: expect.stringMatching(/^"[\w-]{22}"$/) });
    expect((await save(owner, mine.version, '310.00')).status).toBe(200);
    const refused = await save(bookkeeper, theirs.version, '95.00');
    expect(refused.status).toBe(412);
    expect(readProblem(refused)).toMatchObject({
      code: 'changed_meanwhile',
      detail: expect.stringContaining('Load it again'),
    });
    expect((await load(bookkeeper)).estimate?.cost.total).toBe('310.00');
  });

  it('goes on from each answer, also behind a proxy that weakens the tag', async () => {
    const { version } = await load(owner);
    const saved = await save(owner, `W/${version}`, '320.00');
    expect(saved.status).toBe(200);
    expect((await load(owner)).version).toBe(saved.headers['etag']);
    expect((await save(owner, saved.headers['etag'] ?? '', '330.00')).status).toBe(200);
  });

  it('is saved over on demand', async () => {
    expect((await save(bookkeeper, '*', '95.00')).status).toBe(200);
    expect((await load(owner)).estimate?.cost.total).toBe('95.00');
  });

  it('is not changed by who does not say on what', async () => {
    for (const method of ['patch', 'delete'] as const) {
      const refused = await owner.send(method, path, method === 'patch' ? toInput('1.00') : undefined);
      expect(refused.status).toBe(428);
      expect(readProblem(refused)).toMatchObject({
        code: 'version_missing',
        detail: expect.stringContaining('If-Match'),
      });
    }
    expect((await load(owner)).estimate?.cost.total).toBe('95.00');
  });

  it('is removed by who has seen it last', async () => {
    const { version } = await load(owner);
    const outdated = await owner.open('delete', path).set('If-Match', '"somethingelse"');
    expect(outdated.status).toBe(412);
    const removed = await owner.open('delete', path).set('If-Match', version);
    expect(removed.status).toBe(204);
    expect(await load(owner)).toEqual({ estimate: null, version: removed.headers['etag'] });
  });
});
