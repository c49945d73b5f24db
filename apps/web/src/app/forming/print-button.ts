import { ChangeDetectionStrategy, Component, DOCUMENT, inject, input } from '@angular/core';

/** Prints the page as its print style lays it out. */
@Component({
  selector: 'app-print-button',
  template: `<button type="button" class="button" (click)="print()">{{ label() }}</button>`,
  styles: `
    @media print {
      :host {
        display: none;
      }
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PrintButton {
  private readonly window = inject(DOCUMENT).defaultView;
  readonly label = input('Print');

  protected print(): void {
    this.window?.print();
  }
}
