import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { Router } from '@angular/router';
import { type SourceCell } from '@brakeven/contract';
import { WorkingsDrawer } from '@brakeven/ui';
import { toSourceUrl } from './source-url';
import { WorkingsStore } from './workings-store';

/** The workings of the figure that was pressed, over whatever page it stands on. */
@Component({
  selector: 'app-workings-panel',
  imports: [WorkingsDrawer],
  template: `
    <app-workings-drawer
      [workings]="store.workings()"
      [isLoading]="store.isLoading()"
      [problem]="store.problem()"
      [canGoBack]="store.canGoBack()"
      [sourceHref]="toSourceUrl"
      (opened)="store.open($event)"
      (back)="store.back()"
      (closed)="store.close()"
      (moreWanted)="store.loadMore()"
      (retried)="store.reload()"
      (sourceFollowed)="followSource($event)"
    />
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class WorkingsPanel {
  protected readonly store = inject(WorkingsStore);
  private readonly router = inject(Router);
  protected readonly toSourceUrl = toSourceUrl;

  protected followSource(source: SourceCell): void {
    this.store.close();
    void this.router.navigateByUrl(toSourceUrl(source));
  }
}
