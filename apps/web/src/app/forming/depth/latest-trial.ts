import { inject } from '@angular/core';
import { type ResolveFn } from '@angular/router';
import { type TrialBendDto } from '@brakeven/contract';
import { catchError, map, of } from 'rxjs';
import { TrialBendsApi } from '../../api/trial-bends-api';

/** The latest trial bend of the shop, on whose tools Ram depth opens; null if there is none or it cannot be had now. */
export const latestTrial: ResolveFn<TrialBendDto | null> = () =>
  inject(TrialBendsApi)
    .getLatest()
    .pipe(
      map((trial) => trial ?? null),
      catchError(() => of(null)),
    );
