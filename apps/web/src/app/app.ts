import { ChangeDetectionStrategy, Component } from '@angular/core';
import { RouterOutlet } from '@angular/router';
import { Notices } from './shell/notices';

@Component({
  selector: 'app-root',
  imports: [RouterOutlet, Notices],
  template: '<router-outlet /><app-notices />',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class App {}
