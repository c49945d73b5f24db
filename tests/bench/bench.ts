/** How to reach one database: as the application's role, as the owner of the schema. */
export interface BenchDatabase {
  DATABASE_URL: string;
  DATABASE_OWNER_URL: string;
  SESSION_SECRET: string;
}

/** What `npm run bench` gives each bench. */
export interface BenchContext {
  /** Makes a database anew, migrated and empty, on a throw-away cluster without fsync. */
  makeDatabase(name: string): Promise<BenchDatabase>;
  /** Starts the built API with the built web application on a free port. */
  startApi(database: BenchDatabase): Promise<{ address: string; stop(): Promise<void> }>;
  /** Folder of the built web application. */
  webRoot: string;
  /** Prints a line of progress. */
  say(text: string): void;
}

/** One measured ratio. Times differ from machine to machine; a ratio of two times in one run hardly does. */
export interface BenchRow {
  /** What is compared with what: 'entries written, share of COPY’s speed'. */
  measure: string;
  ratio: number;
  /** Null where the ratio is told for information. */
  aim: { atLeast: number } | { atMost: number } | null;
  /** What stands behind the ratio: '301 ms against 412 ms, median of 5'. */
  detail: string;
}

/** A `*.bench.ts` file's default export. */
export type Bench = (context: BenchContext) => Promise<BenchRow[]>;
