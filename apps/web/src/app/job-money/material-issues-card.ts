import { ChangeDetectionStrategy, Component, computed, inject, input, output } from '@angular/core';
import { MatDialog } from '@angular/material/dialog';
import { type IssueKind, type JobMaterialList, type MaterialIssue } from '@brakeven/contract';
import { todayIn } from '@brakeven/values';
import { MaterialsApi } from '../api/materials-api';
import { type IssueStart } from '../materials/issue-form';
import { toSizeWords } from '../materials/ledger-columns';
import { fromJobIssue } from '../materials/to-issue-row';
import { SessionStore } from '../session/session-store';
import { type DatedColumn, type DatedRows } from './dated-rows';
import { DatedRowsCard } from './dated-rows-card';
import { openRowDialog } from './open-row-dialog';

/** What a job drew from stock and gave back, with the cost that it bears. A lead sees weights only. */
@Component({
  selector: 'app-material-issues-card',
  imports: [DatedRowsCard],
  template: `<app-dated-rows-card [rows]="rows()" (changed)="changed.emit()" />`,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class MaterialIssuesCard {
  private readonly api = inject(MaterialsApi);
  private readonly session = inject(SessionStore);
  private readonly dialog = inject(MatDialog);

  readonly jobId = input.required<string>();
  readonly changed = output();

  protected readonly rows = computed((): DatedRows<MaterialIssue, JobMaterialList> => {
    const jobId = this.jobId();
    return {
      heading: 'Material',
      empty: ['No material issued.', 'What the job draws from stock stands here, at the average of its day.'],
      totalLabel: 'Total',
      columns: this.listColumns(),
      canEdit: this.session.can('materials.edit'),
      actions: [
        { label: 'Take back', isSecond: true, run: () => this.edit(null, 'return') },
        { label: 'Issue material', run: () => this.edit(null, 'issue') },
      ],
      load: () => this.api.listOfJob(jobId),
      idOf: ({ issueId }) => issueId,
      dateOf: ({ issuedOn }) => issuedOn,
      nameOf: toName,
      correct: (issue) => this.edit(issue, issue.kind),
      void: ({ issueId }) => this.api.voidIssue(issueId),
      restore: ({ issueId }) => this.api.restoreIssue(issueId),
    };
  });

  private listColumns(): DatedColumn<MaterialIssue, JobMaterialList>[] {
    const amount: DatedColumn<MaterialIssue, JobMaterialList> = {
      heading: 'Amount',
      isNumber: true,
      cell: (issue) => toAmountCell(issue),
      total: ({ total }) => ({
        amount: total,
        ref: { figure: 'job.material', jobId: this.jobId() },
        label: 'Material',
      }),
    };
    return [
      {
        heading: 'Material',
        cell: ({ kind, material, materialId }) => ({
          text: material,
          link: ['/materials', materialId],
          ...(kind === 'return' && { tag: 'returned' }),
        }),
      },
      { heading: 'How much', cell: (issue) => ({ text: this.toSize(issue), aside: issue.note }) },
      {
        heading: 'Weight',
        isNumber: true,
        cell: (issue) => ({ massKg: toSignedKg(issue) }),
        total: ({ weightKg }) => ({ massKg: weightKg }),
      },
      ...(this.session.can('materials.money') ? [amount] : []),
    ];
  }

  private toSize({ sheets, pieces, blankLengthMm, blankWidthMm }: MaterialIssue): string {
    const size = { sheets, pieces, lengthMm: blankLengthMm, widthMm: blankWidthMm };
    return toSizeWords(size, this.session.shopFormat().units);
  }

  private edit(issue: MaterialIssue | null, kind: IssueKind) {
    const { units, timeZone } = this.session.shopFormat();
    const data: IssueStart = {
      issue: issue && fromJobIssue(issue),
      kind,
      jobId: this.jobId(),
      materialId: issue?.materialId ?? '',
      today: todayIn(timeZone),
      units,
    };
    return openRowDialog<IssueStart, MaterialIssue>(
      this.dialog,
      async () => (await import('../materials/issue-dialog')).IssueDialog,
      { data, width: '560px', tell: (saved) => `${toName(saved)} ${issue ? 'corrected' : 'entered'}.` },
    );
  }
}

function toName({ kind, material }: MaterialIssue): string {
  return `${kind === 'return' ? 'Return' : 'Issue'} of ${material}`;
}

/** As the job bears it: what came back counts against it. */
function toSignedKg({ kind, weightKg }: MaterialIssue): string {
  return kind === 'return' ? `-${weightKg}` : weightKg;
}

/** What is voided has no cost any more. */
function toAmountCell(issue: MaterialIssue) {
  const { amount, issueId, voidedAt } = issue;
  if (voidedAt !== null) return { text: '–' };
  return { amount, ref: { figure: 'stock.issue' as const, issueId }, label: toName(issue) };
}
