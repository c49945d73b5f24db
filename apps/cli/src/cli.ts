import { AppError, type ErrorCode, type Issue } from '@brakeven/contract';

/** What the programs that call this one go by. */
export const EXIT = { done: 0, refused: 1, usage: 2, unreachable: 3 } as const;
export type ExitCode = (typeof EXIT)[keyof typeof EXIT];

/** What a command has found out: for programs, and the same in words for people. */
export interface CommandAnswer {
  json: unknown;
  /** Made only when somebody is to read it. */
  text: () => string;
  /** `refused` for an answer that says why nothing was written. */
  exitCode?: ExitCode;
}

/** How one run of the program speaks to whoever has called it. */
export class Cli {
  exitCode: ExitCode = EXIT.done;

  constructor(
    readonly env: NodeJS.ProcessEnv,
    private readonly isJson: boolean,
  ) {}

  /** Standard output belongs to answers. */
  answer({ json, text, exitCode = EXIT.done }: CommandAnswer): void {
    process.stdout.write(`${this.isJson ? JSON.stringify(json, null, 2) : text().trimEnd()}\n`);
    this.exitCode = exitCode;
  }

  /** Everything beside the answer goes to standard error. */
  say(line: string): void {
    process.stderr.write(`${line}\n`);
  }

  /** Says why a command was refused, for people on standard error, for programs as JSON on standard output. */
  refuse(error: { code: ErrorCode; message: string; issues: readonly Issue[] }, exitCode: ExitCode): void {
    const { code, message, issues } = error;
    if (this.isJson) {
      process.stdout.write(`${JSON.stringify({ error: { code, message, issues } }, null, 2)}\n`);
    }
    this.say(message);
    for (const issue of issues.filter((one) => one.message !== message)) {
      this.say(`  ${issue.field}: ${issue.message}`);
    }
    this.exitCode = exitCode;
  }
}

/** The caller has used a command wrongly; ends with exit code 2. */
export class UsageError extends AppError {
  constructor(message: string, cause?: unknown) {
    super('invalid_input', message, { cause });
  }
}
