import { ChangeDetectionStrategy, Component, computed, inject, input, output } from '@angular/core';
import { rxResource, takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { MatDialog } from '@angular/material/dialog';
import { RouterLink } from '@angular/router';
import { type FigureRef, type IssueKind, type MaterialIssue } from '@brakeven/contract';
import { Figure, LoadingSkeleton, LocalDatePipe, MassPipe, StatusTag } from '@brakeven/ui';
import { todayIn } from '@brakeven/values';
import { MaterialsApi } from '../api/materials-api';
import { type IssueStart } from '../materials/issue-form';
import { toSizeWords } from '../materials/ledger-columns';
import { fromJobIssue } from '../materials/to-issue-row';
import { SessionStore } from '../session/session-store';
import { LoadError } from '../shell/load-error';
import { RowChanges } from './row-changes';

/** What a job drew from stock and gave back, with the cost that it bears. A lead sees weights only. */
@Component({
  selector: 'app-material-issues-card',
  imports: [Figure, LoadError, LoadingSkeleton, LocalDatePipe, MassPipe, RouterLink, StatusTag],
  providers: [RowChanges],
  templateUrl: './material-issues-card.html',
  styleUrl: './voided-row.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class MaterialIssuesCard {
  private readonly api = inject(MaterialsApi);
  private readonly session = inject(SessionStore);
  private readonly dialog = inject(MatDialog);
  private readonly changes = inject(RowChanges);

  readonly jobId = input.required<string>();
  readonly changed = output();

  protected readonly list = rxResource({
    params: () => this.jobId(),
    stream: ({ params }) => this.api.listOfJob(params),
  });
  protected readonly canEdit = computed(() => this.session.can('materials.edit'));
  protected readonly hasMoney = computed(() => this.session.can('materials.money'));
  protected readonly totalRef = computed<FigureRef>(() => ({ figure: 'job.material', jobId: this.jobId() }));
  protected readonly nameOf = toName;

  constructor() {
    this.changes.changed.pipe(takeUntilDestroyed()).subscribe(() => {
      this.list.reload();
      this.changed.emit();
    });
  }

  protected toSize({ sheets, pieces, blankLengthMm, blankWidthMm }: MaterialIssue): string {
    const size = { sheets, pieces, lengthMm: blankLengthMm, widthMm: blankWidthMm };
    return toSizeWords(size, this.session.shopFormat().units);
  }

  /** As the job bears it: what came back counts against it. */
  protected signed({ kind, weightKg }: MaterialIssue): string {
    return kind === 'return' ? `-${weightKg}` : weightKg;
  }

  protected async edit(issue: MaterialIssue | null, kind: IssueKind): Promise<void> {
    const { IssueDialog } = await import('../materials/issue-dialog');
    const { units, timeZone } = this.session.shopFormat();
    const data: IssueStart = {
      issue: issue && fromJobIssue(issue),
      kind,
      jobId: this.jobId(),
      materialId: issue?.materialId ?? '',
      today: todayIn(timeZone),
      units,
    };
    this.dialog
      .open<unknown, IssueStart, MaterialIssue>(IssueDialog, { data, width: '560px' })
      .afterClosed()
      .subscribe((saved) => {
        if (saved) this.changes.tell(`${toName(saved)} ${issue ? 'corrected' : 'entered'}.`);
      });
  }

  protected voidRow(issue: MaterialIssue): void {
    const { issueId } = issue;
    this.changes.void(toName(issue), this.api.voidIssue(issueId), () => this.api.restoreIssue(issueId));
  }

  protected restore(issue: MaterialIssue): void {
    this.changes.restore(toName(issue), this.api.restoreIssue(issue.issueId));
  }
}

function toName({ kind, material }: MaterialIssue): string {
  return `${kind === 'return' ? 'Return' : 'Issue'} of ${material}`;
}
