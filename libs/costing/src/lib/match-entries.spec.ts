import { toHours, toLocalDate } from '@brakeven/values';
import fc from 'fast-check';
import { matchByNaturalKey, naturalKey, type NaturalKeyParts } from './match-entries';

function partsOf(changes: Partial<NaturalKeyParts> = {}): NaturalKeyParts {
  return {
    employeeId: 'ana',
    workedOn: toLocalDate('2026-03-02'),
    jobId: 'job-1',
    operationId: 'form',
    machineId: 'press',
    hours: toHours('7.5'),
    ...changes,
  };
}

describe('the natural key', () => {
  it('is the same for the same work, hours to four decimals', () => {
    expect(naturalKey(partsOf({ hours: toHours('7.50000') }))).toBe(naturalKey(partsOf()));
    expect(naturalKey(partsOf())).toBe('ana|2026-03-02|job-1|form|press|7.5000');
  });

  it.each<Partial<NaturalKeyParts>>([
    { employeeId: 'ben' },
    { workedOn: toLocalDate('2026-03-03') },
    { jobId: 'job-2' },
    { operationId: 'weld' },
    { machineId: null },
    { hours: toHours('7.5001') },
  ])('differs where %j differs', (changes) => {
    expect(naturalKey(partsOf(changes))).not.toBe(naturalKey(partsOf()));
  });
});

describe('matching with what is stored', () => {
  const key = naturalKey(partsOf());

  it('takes the first two of three as there if two are stored', () => {
    const matched = matchByNaturalKey([partsOf(), partsOf(), partsOf()], new Map([[key, 2]]));
    expect(matched.map(({ nth, isAlreadyThere }) => [nth, isAlreadyThere])).toEqual([
      [1, true],
      [2, true],
      [3, false],
    ]);
  });

  it('keeps the order, and takes nothing as there if nothing is', () => {
    const candidates = [partsOf({ jobId: 'job-2' }), partsOf()];
    const matched = matchByNaturalKey(candidates, new Map());
    expect(matched.map((match) => match.candidate)).toEqual(candidates);
    expect(matched.some((match) => match.isAlreadyThere)).toBe(false);
  });

  it('importing twice is importing once, whatever was stored before', () => {
    const candidate = fc
      .record({ jobId: fc.constantFrom('a', 'b'), machineId: fc.constantFrom('press', null) })
      .map((changes) => partsOf(changes));
    fc.assert(
      fc.property(fc.array(candidate), fc.array(candidate), (before, file) => {
        const stored = new Map<string, number>();
        const store = (parts: NaturalKeyParts) =>
          stored.set(naturalKey(parts), (stored.get(naturalKey(parts)) ?? 0) + 1);
        before.forEach(store);
        const first = matchByNaturalKey(file, stored);
        first.filter((match) => !match.isAlreadyThere).forEach((match) => store(match.candidate));
        expect(matchByNaturalKey(file, stored).every((match) => match.isAlreadyThere)).toBe(true);
        for (const [storedKey, count] of stored) {
          const inFile = file.filter((parts) => naturalKey(parts) === storedKey).length;
          const was = before.filter((parts) => naturalKey(parts) === storedKey).length;
          expect(count).toBe(Math.max(inFile, was));
        }
      }),
    );
  });
});
