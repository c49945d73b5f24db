import { inject, Injectable } from '@angular/core';
import { type Observable, Subject } from 'rxjs';
import { toProblemSentence } from '../api/problem-text';
import { Notifier } from '../shell/notifier';
import { RollupStore } from '../shell/rollup-store';

/** Voiding and putting back rows of a card, told at the foot of the page and taken back by 'Undo'. */
@Injectable()
export class RowChanges {
  private readonly notifier = inject(Notifier);
  private readonly rollup = inject(RollupStore);
  private readonly made = new Subject<void>();

  /** Something has changed and the costs with it. */
  readonly changed = this.made.asObservable();

  /** Says what a dialog has saved. */
  tell(text: string): void {
    this.finish(text);
  }

  /** Voids a row; 'Undo' puts it back. */
  void(name: string, request: Observable<void>, restore: () => Observable<void>): void {
    this.run(request, `${name} voided.`, () => this.restore(name, restore()));
  }

  restore(name: string, request: Observable<void>): void {
    this.run(request, `${name} put back.`);
  }

  private run(request: Observable<void>, done: string, undo?: () => void): void {
    request.subscribe({
      next: () => this.finish(done, undo),
      error: (error: unknown) => this.notifier.warn(toProblemSentence(error)),
    });
  }

  private finish(text: string, undo?: () => void): void {
    this.notifier.say(text, undo);
    this.made.next();
    void this.rollup.refresh();
  }
}
