import { TestBed } from '@angular/core/testing';
import { firstValueFrom, of, throwError } from 'rxjs';
import { EntriesApi } from '../api/entries-api';
import { JobsApi } from '../api/jobs-api';
import { PeopleApi } from '../api/people-api';
import { ShopApi } from '../api/shop-api';
import { filterNames, KnownNames } from './known-names';

const names = ['104 Jo Alvarez', '105 Bo Tran', '106 Joan Alder'].map((label, index) => ({
  targetId: `id-${index}`,
  label,
}));

describe('filterNames', () => {
  it('wants every word, anywhere, in any case', () => {
    expect(filterNames(names, 'al JO').map(({ label }) => label)).toEqual([
      '104 Jo Alvarez',
      '106 Joan Alder',
    ]);
    expect(filterNames(names, '105 bo')).toHaveLength(1);
    expect(filterNames(names, '')).toHaveLength(3);
  });
});

describe('KnownNames', () => {
  const people = { listEmployees: jest.fn() };
  const jobs = { listJobs: jest.fn() };
  let known: KnownNames;

  beforeEach(() => {
    jest.resetAllMocks();
    TestBed.configureTestingModule({
      providers: [
        KnownNames,
        { provide: PeopleApi, useValue: people },
        { provide: JobsApi, useValue: jobs },
        { provide: ShopApi, useValue: {} },
        { provide: EntriesApi, useValue: {} },
      ],
    });
    known = TestBed.inject(KnownNames);
  });

  it('asks for all employees once, whatever is searched', async () => {
    people.listEmployees.mockReturnValue(of([{ employeeId: 'e1', number: '104', name: 'Jo Alvarez' }]));
    expect(await firstValueFrom(known.search('employee', 'jo'))).toEqual([
      { targetId: 'e1', label: '104 Jo Alvarez' },
    ]);
    expect(await firstValueFrom(known.search('employee', 'nobody'))).toEqual([]);
    expect(people.listEmployees).toHaveBeenCalledTimes(1);
  });

  it('asks again after a failure', async () => {
    people.listEmployees
      .mockReturnValueOnce(throwError(() => new Error('offline')))
      .mockReturnValueOnce(of([]));
    await expect(firstValueFrom(known.search('employee', ''))).rejects.toThrow('offline');
    expect(await firstValueFrom(known.search('employee', ''))).toEqual([]);
  });

  it('lets the server search the jobs', async () => {
    jobs.listJobs.mockReturnValue(of({ items: [{ jobId: 'j1', number: '2231', title: 'Conveyor guards' }] }));
    const found = await firstValueFrom(known.search('job', ' guard '));
    expect(found).toEqual([{ targetId: 'j1', label: '2231 Conveyor guards' }]);
    expect(jobs.listJobs).toHaveBeenCalledWith(expect.objectContaining({ search: 'guard' }));
  });
});
