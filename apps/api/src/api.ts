import { type Database, type SheetReader } from '@brakeven/use-cases';
import { type Mount } from './mount';
import { type ProgressHub } from './progress/progress-hub';

/** What the routes of a resource are given. */
export interface Api {
  mount: Mount;
  db: Database;
  reader: SheetReader;
  progress: ProgressHub;
}
