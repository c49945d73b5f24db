import { Injectable, signal } from '@angular/core';

export interface Notice {
  id: number;
  text: string;
  tone: 'info' | 'problem';
  action?: { label: string; run: () => void };
}

/** Long enough to read and to reach 'Undo'; a problem stays until it is closed. */
const SHOWN_MS = 8_000;

/** Short messages at the foot of the page, at most with one action such as 'Undo'. */
@Injectable({ providedIn: 'root' })
export class Notifier {
  private readonly current = signal<Notice | null>(null);
  private timer: ReturnType<typeof setTimeout> | undefined;
  private count = 0;
  readonly notice = this.current.asReadonly();

  /** Says what was done; with `undo` it offers to take it back. */
  say(text: string, undo?: () => void): void {
    this.show({ text, tone: 'info', action: undo && { label: 'Undo', run: undo } });
    this.resume();
  }

  /** Says what went wrong; stays until closed. */
  warn(text: string, retry?: () => void): void {
    this.show({ text, tone: 'problem', action: retry && { label: 'Try again', run: retry } });
  }

  close(): void {
    this.pause();
    this.current.set(null);
  }

  /** Keeps the message while the pointer or the focus is on it. */
  pause(): void {
    clearTimeout(this.timer);
  }

  resume(): void {
    this.pause();
    if (this.current()?.tone === 'info') this.timer = setTimeout(() => this.close(), SHOWN_MS);
  }

  private show(notice: Omit<Notice, 'id'>): void {
    this.pause();
    this.current.set({ ...notice, id: ++this.count });
  }
}
