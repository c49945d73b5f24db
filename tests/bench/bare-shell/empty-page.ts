import { ChangeDetectionStrategy, Component } from '@angular/core';

/** A page with nothing on it. */
@Component({
  selector: 'app-empty-page',
  template: '<p>Nothing here</p>',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class EmptyPage {}
