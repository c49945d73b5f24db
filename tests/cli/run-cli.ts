import { spawn } from 'node:child_process';
import { existsSync } from 'node:fs';
import { resolve } from 'node:path';

const program = resolve(__dirname, '../../dist/apps/cli/main.js');

export interface Run {
  code: number | null;
  stdout: string;
  stderr: string;
}

/** Runs the built program as a caller would, who may have closed the other end of its standard output. */
export function runCli(
  args: readonly string[],
  env: NodeJS.ProcessEnv = {},
  { isReaderGone = false } = {},
): Promise<Run> {
  if (!existsSync(program)) throw new Error(`${program} is not there; npx nx build cli makes it.`);
  const child = spawn(process.execPath, [program, ...args], { env: { ...process.env, ...env } });
  if (isReaderGone) child.stdout.destroy();
  const run: Run = { code: null, stdout: '', stderr: '' };
  child.stdout.on('data', (chunk: Buffer) => (run.stdout += chunk.toString()));
  child.stderr.on('data', (chunk: Buffer) => (run.stderr += chunk.toString()));
  return new Promise((done, fail) => {
    child.on('error', fail);
    child.on('close', (code) => done({ ...run, code }));
  });
}

/** The same with `--json`: the exit code, and what stands on standard output, which must be JSON alone. */
export async function runJson<T = Record<string, unknown>>(
  ...args: readonly string[]
): Promise<{ code: number | null; json: T }> {
  const { code, stdout, stderr } = await runCli([...args, '--json']);
  try {
    return { code, json: JSON.parse(stdout) as T };
  } catch {
    throw new Error(`brakeven ${args.join(' ')} answered no JSON:\n${stdout}\n${stderr}`);
  }
}
