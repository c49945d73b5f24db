import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { RouterLink } from '@angular/router';

const WORDS = {
  forbidden: {
    title: 'This page is not for your role',
    text: 'The owner of the shop decides who may see what. Ask them if you need it for your work.',
  },
  'no-such-page': {
    title: 'There is no such page',
    text: 'The address may be mistyped, or the page has moved. Nothing was changed.',
  },
} as const;

/** Says why a page is not shown, and leads back. */
@Component({
  selector: 'app-blocked-page',
  imports: [RouterLink],
  template: `
    <h1>{{ words().title }}</h1>
    <p>{{ words().text }}</p>
    <a class="button" routerLink="/">To your first page</a>
  `,
  styles: `
    :host {
      display: grid;
      justify-items: start;
      gap: 12px;
      max-width: 60ch;
      padding: 40px 0;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class BlockedPage {
  /** From the route's data. */
  readonly reason = input<keyof typeof WORDS>('no-such-page');
  protected readonly words = computed(() => WORDS[this.reason()]);
}
