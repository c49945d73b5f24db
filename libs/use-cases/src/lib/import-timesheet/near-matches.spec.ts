import { findNearMatches, normaliseName, toComparableName } from './near-matches';

const people = [
  { targetId: 'd', code: '12', name: 'Dana Quill' },
  { targetId: 'i', code: '14', name: 'Ivo Marsh' },
  { targetId: 'm', code: '15', name: 'Mara Quillan' },
  { targetId: 'o', code: '007', name: 'Odd Berg' },
].map(toComparableName);
const jobs = ['J-1041', 'J-1042', 'K-77'].map((code) =>
  toComparableName({ targetId: code, code, name: `Work for ${code}` }),
);

const ids = (spelling: string, names = people) =>
  findNearMatches(spelling, names).map(({ targetId }) => targetId);

describe('normaliseName', () => {
  it('keeps nothing of case, width and spaces', () => {
    expect(normaliseName('  Dana\u00a0  QUILL ')).toBe('dana quill');
    expect(normaliseName('Ｄana')).toBe('dana');
  });
});

describe('findNearMatches', () => {
  it.each([
    ['Dana Quil', 'd'],
    ['Quill, Dana', 'd'],
    ['D. Quill', 'd'],
    ['quill d', 'd'],
    ['Dan Quill', 'd'],
    ['Ivo', 'i'],
    ['Mara Quilan', 'm'],
    ['7', 'o'],
  ])('offers for %s first %s', (spelling, expected) => {
    expect(ids(spelling)[0]).toBe(expected);
  });

  it('finds a number written without its punctuation or its leading noughts', () => {
    expect(ids('j1041', jobs)[0]).toBe('J-1041');
    expect(ids('J-01041', jobs)[0]).toBe('J-1041');
  });

  it('offers at most three, the most like first, and nothing for what is like nothing', () => {
    const many = ['J-1041', 'J-1042', 'J-1043', 'J-1044'].map((code) =>
      toComparableName({ targetId: code, code, name: '' }),
    );
    expect(ids('J-1043x', many)).toHaveLength(3);
    expect(ids('J-1043x', many)[0]).toBe('J-1043');
    expect(ids('Zebediah Okonkwo-Farnsworth')).toEqual([]);
    expect(ids('x'.repeat(5_000))).toEqual([]);
  });
});
