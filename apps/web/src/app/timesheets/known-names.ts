import { inject, Injectable } from '@angular/core';
import { type AliasKind } from '@brakeven/contract';
import { catchError, map, type Observable, shareReplay, throwError } from 'rxjs';
import { EntriesApi } from '../api/entries-api';
import { JobsApi } from '../api/jobs-api';
import { PeopleApi } from '../api/people-api';
import { ShopApi } from '../api/shop-api';

/** Somebody or something that a spelling may stand for. */
export interface KnownName {
  targetId: string;
  label: string;
}

const OFFERED_MAX = 50;

/** Everybody and everything that the shop knows by name, for the spellings that it does not know. */
@Injectable()
export class KnownNames {
  private readonly entries = inject(EntriesApi);
  private readonly people = inject(PeopleApi);
  private readonly shop = inject(ShopApi);
  private readonly jobs = inject(JobsApi);
  private readonly lists = new Map<AliasKind, Observable<KnownName[]>>();

  /** Names of a kind whose words hold the text, at most 50; jobs are searched on the server, for there are many. */
  search(kind: AliasKind, text: string): Observable<KnownName[]> {
    const wanted = text.trim();
    if (kind === 'job') return this.searchJobs(wanted);
    return this.getList(kind).pipe(map((names) => filterNames(names, wanted).slice(0, OFFERED_MAX)));
  }

  private searchJobs(search: string): Observable<KnownName[]> {
    return this.jobs
      .listJobs({ search, limit: OFFERED_MAX, sort: 'number', direction: 'desc' })
      .pipe(
        map(({ items }) =>
          items.map((job) => ({ targetId: job.jobId, label: `${job.number} ${job.title}` })),
        ),
      );
  }

  private getList(kind: Exclude<AliasKind, 'job'>): Observable<KnownName[]> {
    const known = this.lists.get(kind);
    if (known) return known;
    const list = this.load(kind).pipe(
      catchError((error: unknown) => {
        this.lists.delete(kind);
        return throwError(() => error);
      }),
      shareReplay(1),
    );
    this.lists.set(kind, list);
    return list;
  }

  private load(kind: Exclude<AliasKind, 'job'>): Observable<KnownName[]> {
    switch (kind) {
      case 'employee':
        return this.people
          .listEmployees()
          .pipe(
            map((all) =>
              all.map((one) => ({ targetId: one.employeeId, label: `${one.number} ${one.name}` })),
            ),
          );
      case 'operation':
        return this.shop
          .listOperations()
          .pipe(
            map((all) => all.map((one) => ({ targetId: one.operationId, label: `${one.code} ${one.name}` }))),
          );
      case 'machine':
        return this.entries
          .getChoices()
          .pipe(map(({ machines }) => machines.map(({ id, label }) => ({ targetId: id, label }))));
    }
  }
}

/** Names that hold every word of the text, whatever their case. */
export function filterNames(names: readonly KnownName[], text: string): KnownName[] {
  const words = text.toLowerCase().split(/\s+/).filter(Boolean);
  return names.filter(({ label }) => words.every((word) => label.toLowerCase().includes(word)));
}
