import { spawn } from 'node:child_process';
import { readFileSync } from 'node:fs';
import { createServer } from 'node:net';
import { setTimeout as sleep } from 'node:timers/promises';
import { atShutdown, isShuttingDown } from './shutdown.mjs';
import { SetupError, root } from './workspace.mjs';

/**
 * @typedef {object} RunOptions
 * @property {string} [cwd] the checkout unless told
 * @property {NodeJS.ProcessEnv} [env] the script's own unless told
 * @property {string} [input] text for its standard input
 * @property {{ uid: number, gid: number } | null} [user] whom to run it as, when not oneself
 * @property {number} [timeLimitMs] after which it is stopped, with code 124
 * @property {(text: string) => void} [onOutput] both outputs as they come
 */

/**
 * Runs a program to its end, in a process group of its own, so that a Ctrl-C reaches it through us only.
 * @param {string} command
 * @param {string[]} args
 * @param {RunOptions} [options]
 * @returns {Promise<{ code: number, stdout: string, output: string }>} code 127 when it cannot be started
 */
export function run(command, args, options = {}) {
  const child = spawn(command, args, {
    cwd: options.cwd ?? root,
    env: options.env ?? process.env,
    detached: true,
    stdio: ['pipe', 'pipe', 'pipe'],
    ...options.user,
  });
  const forget = atShutdown(() => stopGroup(child));
  let isLate = false;
  const limit = setTimeout(
    () => {
      isLate = true;
      void stopGroup(child);
    },
    options.timeLimitMs ?? 2 ** 31 - 1,
  );
  let stdout = '';
  let output = '';
  const keep = (/** @type {string} */ text) => {
    output += text;
    options.onOutput?.(text);
  };
  child.stdout.setEncoding('utf8').on('data', (text) => {
    stdout += text;
    keep(text);
  });
  child.stderr.setEncoding('utf8').on('data', keep);
  child.stdin.on('error', () => undefined).end(options.input ?? '');
  return new Promise((done) => {
    child.on('error', (error) => {
      clearTimeout(limit);
      forget();
      done({ code: 127, stdout, output: `${output}${error.message}\n` });
    });
    child.on('close', (code) => {
      clearTimeout(limit);
      forget();
      done({ code: isLate ? 124 : (code ?? 1), stdout, output });
    });
  });
}

/**
 * Like `run`, but a failure is an error that carries the end of what the program said.
 * @param {string} what what was being done, for the message: 'Building failed'
 * @param {string} command
 * @param {string[]} args
 * @param {RunOptions} [options]
 * @returns {Promise<string>} its standard output
 */
export async function runOrThrow(what, command, args, options = {}) {
  const { code, stdout, output } = await run(command, args, options);
  if (code !== 0) {
    await untilShutDown();
    throw new SetupError(`${what}:\n${lastLines(output, 120)}`);
  }
  return stdout;
}

/** Holds whoever failed only because the script is being stopped; the script ends meanwhile. */
export async function untilShutDown() {
  if (isShuttingDown()) {
    await new Promise(() => undefined);
  }
}

/**
 * @typedef {object} Service
 * @property {number} pid
 * @property {Promise<number>} ended its exit code, once it has ended
 * @property {() => Promise<void>} stop SIGTERM, and SIGKILL when it has not gone after 10 seconds
 */

/**
 * Starts a program that keeps running, in a process group of its own.
 * @param {string} command
 * @param {string[]} args
 * @param {{ env: NodeJS.ProcessEnv, onOutput: (text: string) => void }} options
 * @returns {Service}
 */
export function startService(command, args, { env, onOutput }) {
  const child = spawn(command, args, { cwd: root, env, detached: true, stdio: ['ignore', 'pipe', 'pipe'] });
  child.stdout.setEncoding('utf8').on('data', onOutput);
  child.stderr.setEncoding('utf8').on('data', onOutput);
  const ended = new Promise((/** @type {(code: number) => void} */ done) => {
    child.on('error', (error) => {
      onOutput(`${error.message}\n`);
      done(127);
    });
    child.on('close', (code) => done(code ?? 1));
  });
  return { pid: child.pid ?? 0, ended, stop: () => stopGroup(child) };
}

/**
 * @param {import('node:child_process').ChildProcess} child leader of its process group
 */
async function stopGroup(child) {
  if (!child.pid || child.exitCode !== null || child.signalCode !== null) {
    return;
  }
  const gone = new Promise((done) => child.once('exit', done));
  signalGroup(child.pid, 'SIGTERM');
  const late = setTimeout(() => child.pid && signalGroup(child.pid, 'SIGKILL'), 10_000);
  await gone;
  clearTimeout(late);
}

/**
 * @param {number} pid
 * @param {NodeJS.Signals} signal
 */
function signalGroup(pid, signal) {
  try {
    process.kill(-pid, signal);
  } catch {
    // The group is gone already, which is what was wanted.
  }
}

/**
 * @param {number} pid
 * @returns {boolean} whether there is such a process, whoever owns it
 */
export function isAlive(pid) {
  try {
    process.kill(pid, 0);
    return true;
  } catch (error) {
    return error instanceof Error && 'code' in error && error.code === 'EPERM';
  }
}

/**
 * @param {number} pid
 * @returns {string[]} the words of the process's command line; none when there is no such process
 */
export function commandLine(pid) {
  try {
    return readFileSync(`/proc/${pid}/cmdline`, 'utf8').split('\0');
  } catch {
    return [];
  }
}

/**
 * @param {number} port
 * @returns {Promise<boolean>} whether a server could listen there on 127.0.0.1
 */
export function isPortFree(port) {
  return new Promise((done) => {
    const server = createServer();
    server.once('error', () => done(false));
    server.listen(port, '127.0.0.1', () => server.close(() => done(true)));
  });
}

/** Ports above 1023 that browsers and `fetch` refuse to speak to (the Fetch standard's list of bad ports). */
const badPorts = [
  1719, 1720, 1723, 2049, 3659, 4045, 4190, 5060, 5061, 6000, 6566, 6665, 6666, 6667, 6668, 6669, 6679, 6697,
  10080,
];

/**
 * @param {number} port
 * @returns {boolean} whether an ordinary user may serve there and a browser will go there
 */
export function isWebPort(port) {
  return Number.isInteger(port) && port >= 1024 && port <= 65_535 && !badPorts.includes(port);
}

/**
 * @param {number} first
 * @returns {Promise<number>} the first free port from there on that a browser will go to
 */
export async function findFreePort(first) {
  for (let port = first; port < Math.min(first + 200, 65_536); port += 1) {
    if (isWebPort(port) && (await isPortFree(port))) {
      return port;
    }
  }
  throw new SetupError(
    `No free port on 127.0.0.1 from ${first} on. Stop something, or name one with --port.`,
  );
}

/**
 * Waits until a condition holds.
 * @param {() => Promise<boolean> | boolean} condition
 * @param {number} timeoutMs
 * @param {number} [everyMs]
 * @returns {Promise<boolean>} whether it came to hold in time
 */
export async function waitUntil(condition, timeoutMs, everyMs = 100) {
  const end = Date.now() + timeoutMs;
  while (Date.now() < end) {
    if (await condition()) {
      return true;
    }
    await sleep(everyMs);
  }
  return false;
}

/**
 * @param {string} text
 * @param {number} count
 * @returns {string} its last lines
 */
export function lastLines(text, count) {
  return text.trimEnd().split('\n').slice(-count).join('\n');
}
