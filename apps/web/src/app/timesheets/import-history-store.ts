import { inject, Injectable } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatDialog } from '@angular/material/dialog';
import { type TimesheetImport } from '@brakeven/contract';
import { formatHours } from '@brakeven/values';
import { toProblemSentence } from '../api/problem-text';
import { TimesheetsApi } from '../api/timesheets-api';
import { confirm } from '../forms/confirm-dialog';
import { Notifier } from '../shell/notifier';
import { RollupStore } from '../shell/rollup-store';
import { countEntries } from './timesheet-words';

type Undoable = Pick<TimesheetImport, 'importId' | 'fileName' | 'entriesAdded' | 'hoursAdded'>;

/** The imports of the shop, latest first, and the way to take one back. */
@Injectable()
export class ImportHistoryStore {
  private readonly api = inject(TimesheetsApi);
  private readonly notifier = inject(Notifier);
  private readonly rollup = inject(RollupStore);
  private readonly dialog = inject(MatDialog);

  readonly imports = rxResource({ stream: () => this.api.list() });

  load(): void {
    this.imports.reload();
  }

  /** Asks, voids the whole import, and says what was taken back. */
  undo(one: Undoable, done: () => void = () => undefined): void {
    confirm(this.dialog, {
      title: 'Undo this import?',
      text: [
        `It takes back ${countEntries(one.entriesAdded)} with ${formatHours(one.hoursAdded)} hours that came in with “${one.fileName}”.`,
        'Entries of other imports stay. The workbook is kept, and dropping the file again adds its entries anew.',
      ],
      action: `Take back ${countEntries(one.entriesAdded)}`,
    }).subscribe((isConfirmed) => {
      if (isConfirmed) this.takeBack(one.importId, done);
    });
  }

  private takeBack(importId: string, done: () => void): void {
    this.api.undo(importId).subscribe({
      next: ({ entriesVoided, hoursVoided }) => {
        this.notifier.say(`Took back ${countEntries(entriesVoided)} with ${formatHours(hoursVoided)} hours.`);
        this.load();
        void this.rollup.refresh();
        done();
      },
      error: (error: unknown) => this.notifier.warn(toProblemSentence(error)),
    });
  }
}
