import { normaliseName } from './near-matches';
import { createNameIndex, resolveName } from './resolve-name';

const known = [
  { targetId: 'd', code: '12', name: 'Dana Quill' },
  { targetId: 'e', code: '13', name: 'dana  quill' },
  { targetId: 'i', code: '14', name: 'Ivo Marsh' },
  { targetId: 'x', code: '15', name: '14' },
];
const index = (aliases: [string, string][] = []) =>
  createNameIndex('employee', known, new Map(aliases.map(([spelling, id]) => [normaliseName(spelling), id])));

describe('resolveName', () => {
  it('takes a number before a name that is the same', () => {
    expect(resolveName(index(), '14')).toEqual({ found: true, targetId: 'i' });
  });

  it('takes a name that one person has, whatever its case and spaces', () => {
    expect(resolveName(index(), ' IVO   marsh')).toEqual({ found: true, targetId: 'i' });
  });

  it('refuses a name that two people have, and offers both', () => {
    const resolution = resolveName(index(), 'Dana Quill');
    expect(resolution).toMatchObject({
      found: false,
      code: 'employee_ambiguous',
      offers: [
        { targetId: 'd', label: '12 · Dana Quill' },
        { targetId: 'e', label: '13 · dana  quill' },
      ],
    });
  });

  it('lets a remembered spelling settle a name that two people have', () => {
    expect(resolveName(index([['dana quill', 'e']]), 'Dana Quill')).toEqual({ found: true, targetId: 'e' });
  });

  it('never lets a spelling take the place of a known number', () => {
    expect(resolveName(index([['12', 'i']]), '12')).toEqual({ found: true, targetId: 'd' });
  });

  it('says of an unknown name what to do, with a long one cut short', () => {
    const resolution = resolveName(index(), `Q${'u'.repeat(500)}`);
    expect(resolution).toMatchObject({ found: false, code: 'employee_unknown', offers: [] });
    expect(!resolution.found && resolution.message.length).toBeLessThan(200);
    expect(!resolution.found && resolution.message).toContain('under People & rates');
  });

  it('knows a job by its number only', () => {
    const jobs = createNameIndex('job', [{ targetId: 'j', code: 'J-1', name: 'Covers' }], new Map());
    expect(resolveName(jobs, 'j-1').found).toBe(true);
    expect(resolveName(jobs, 'Covers')).toMatchObject({ found: false, code: 'job_unknown' });
  });
});
