import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { Router, RouterLink } from '@angular/router';
import { type SetupCard } from '@brakeven/contract';
import { EmptyState, LoadingSkeleton, LocalDatePipe } from '@brakeven/ui';
import { PressRunsApi } from '../../api/press-runs-api';
import { SessionStore } from '../../session/session-store';
import { LoadError } from '../../shell/load-error';
import { toAngleWords, toForceBand, toForceWords, toPercentWords, toSizeWords } from '../forming-words';
import { PrintButton } from '../print-button';

/** The set-up card of a job: what its last good runs used. */
@Component({
  selector: 'app-setup-card-page',
  imports: [EmptyState, LoadError, LoadingSkeleton, LocalDatePipe, PrintButton, RouterLink],
  templateUrl: './setup-card-page.html',
  styleUrl: './setup-card-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SetupCardPage {
  /** Id of the job, from the address. */
  readonly job = input<string>();

  private readonly api = inject(PressRunsApi);
  private readonly router = inject(Router);
  private readonly units = inject(SessionStore).shopFormat().units;

  protected readonly choices = rxResource({ stream: () => this.api.getChoices() });
  protected readonly jobs = computed(() => (this.choices.hasValue() ? this.choices.value().jobs : []));
  protected readonly card = rxResource({
    params: () => this.job(),
    stream: ({ params }) => this.api.getSetupCard(params),
  });
  protected readonly runs = computed(() =>
    this.card.hasValue() ? this.card.value().runs.map((run) => this.toShown(run)) : [],
  );

  protected choose(jobId: string): void {
    void this.router.navigate([], { queryParams: { job: jobId || null }, replaceUrl: true });
  }

  private toShown(run: SetupCard['runs'][number]) {
    const size = (millimetres: string | null) =>
      millimetres === null ? null : toSizeWords(Number(millimetres), this.units);
    const nose = run.noseRadiusMm === null ? '' : `, nose ${size(run.noseRadiusMm)}`;
    const angle = run.dieAngle === null ? '' : `, ${toAngleWords(Number(run.dieAngle))}`;
    const shown =
      run.highestForceKn === null
        ? ''
        : `; the gauge showed ${toForceWords(Number(run.highestForceKn), this.units)}`;
    return {
      id: run.pressRunId,
      title: `${size(run.thicknessMm)} ${run.material}, ${size(run.bendLengthMm)} long`,
      runOn: run.runOn,
      by: run.loggedBy,
      facts: [
        { name: 'Machine', words: run.machine },
        { name: 'Punch', words: run.punch === null ? 'not noted' : `${run.punch}${nose}` },
        { name: 'Die', words: `${size(run.openingMm)} opening on ${run.die}${angle}` },
        {
          name: 'Force',
          words: `${toForceBand(Number(run.forceLowKn), Number(run.forceHighKn), this.units)} expected${shown}`,
        },
        {
          name: 'Of the rating',
          words:
            run.share === null ? 'no rating known' : `${toPercentWords(run.share)} of the ${run.ratingOf}`,
        },
        { name: 'Strokes and pieces', words: `${run.strokes} strokes, ${run.pieces} pieces` },
      ],
      note: run.note,
    };
  }
}
