import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { type Notice, Notifier } from './notifier';

/** The place where the notifier's messages appear. */
@Component({
  selector: 'app-notices',
  template: `
    <div class="live" aria-live="polite" aria-atomic="true">
      @if (notifier.notice(); as notice) {
        <div
          class="notice"
          role="group"
          aria-label="Message"
          tabindex="-1"
          [class.problem]="notice.tone === 'problem'"
          (mouseenter)="notifier.pause()"
          (mouseleave)="notifier.resume()"
          (focusin)="notifier.pause()"
          (focusout)="notifier.resume()"
          (keydown.escape)="notifier.close()"
        >
          <span class="text">{{ notice.text }}</span>
          @if (notice.action; as action) {
            <button type="button" class="action" (click)="runAction(notice)">{{ action.label }}</button>
          }
          <button type="button" class="close" aria-label="Close message" (click)="notifier.close()">×</button>
        </div>
      }
    </div>
  `,
  styleUrl: './notices.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Notices {
  protected readonly notifier = inject(Notifier);

  protected runAction(notice: Notice): void {
    this.notifier.close();
    notice.action?.run();
  }
}
