import { DOCUMENT, inject, Injectable, signal } from '@angular/core';

/** The tokens' colours as the browser resolves them; charts draw on a canvas that knows no custom properties. */
export interface ChartPalette {
  ink: string;
  inkMuted: string;
  line: string;
  sheet: string;
  layoutBlue: string;
  layoutBlueTint: string;
  brass: string;
  patina: string;
  rust: string;
}

const TOKENS: Readonly<Record<keyof ChartPalette, string>> = {
  ink: '--ink',
  inkMuted: '--ink-muted',
  line: '--line',
  sheet: '--sheet',
  layoutBlue: '--layout-blue',
  layoutBlueTint: '--layout-blue-tint',
  brass: '--brass',
  patina: '--patina',
  rust: '--rust',
};

/** The palette of the theme that is on; changes with it. */
@Injectable({ providedIn: 'root' })
export class ChartPaletteSource {
  private readonly document = inject(DOCUMENT);
  private readonly current = signal(this.read());
  readonly palette = this.current.asReadonly();

  constructor() {
    const root = this.document.documentElement;
    const refresh = () => this.current.set(this.read());
    new MutationObserver(refresh).observe(root, { attributeFilter: ['data-theme'] });
    this.document.defaultView
      ?.matchMedia?.('(prefers-color-scheme: dark)')
      .addEventListener('change', refresh);
  }

  private read(): ChartPalette {
    const entries = Object.entries(TOKENS).map(([name, token]) => [name, this.resolve(token)]);
    return Object.fromEntries(entries) as ChartPalette;
  }

  /** Each by an element of its own: one that changes its colour still has the old one while it fades. */
  private resolve(token: string): string {
    const probe = this.document.createElement('span');
    probe.style.color = `var(${token})`;
    this.document.body.append(probe);
    const { color } = getComputedStyle(probe);
    probe.remove();
    return color;
  }
}
