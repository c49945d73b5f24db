import { spawnSync } from 'node:child_process';
import {
  chmodSync,
  chownSync,
  existsSync,
  mkdirSync,
  readFileSync,
  readdirSync,
  renameSync,
  rmSync,
  statSync,
  writeFileSync,
} from 'node:fs';
import { dirname, join } from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';
import { isRoot } from './configuration.mjs';
import { getPostgresPrograms } from './postgres-programs.mjs';
import { commandLine, isAlive, isPortFree, lastLines, run, runOrThrow, waitUntil } from './processes.mjs';
import { atShutdown } from './shutdown.mjs';
import { SetupError, databaseOutOfReach } from './workspace.mjs';

/**
 * @typedef {object} ClusterSettings
 * @property {string} directory holds `data` and `server.log`; made when missing
 * @property {number} port on 127.0.0.1
 * @property {string} superuserPassword
 * @property {boolean} [isThrowAway] trades safety after a power cut for speed
 */

const always = [
  'listen_addresses=127.0.0.1',
  'unix_socket_directories=',
  'timezone=UTC',
  'log_timezone=UTC',
  'lc_messages=C',
];
const throwAway = ['fsync=off', 'synchronous_commit=off', 'full_page_writes=off'];

/** A PostgreSQL server of our own, reached by password on one port of 127.0.0.1. */
export class DatabaseCluster {
  /** @param {ClusterSettings} settings */
  constructor(settings) {
    this.settings = settings;
    this.port = settings.port;
    this.dataDirectory = join(settings.directory, 'data');
    this.logFile = join(settings.directory, 'server.log');
  }

  /** @returns {boolean} whether this data directory has been initialised */
  exists() {
    return existsSync(join(this.dataDirectory, 'PG_VERSION'));
  }

  /** @returns {{ pid: number, port: number, isReady: boolean } | null} the running server of this data directory */
  findServer() {
    const lines = this.#pidFileLines();
    const pid = Number(lines[0]);
    const words = pid > 0 ? commandLine(pid) : [];
    return words[words.indexOf('-D') + 1] === this.dataDirectory
      ? { pid, port: Number(lines[3]), isReady: lines[7]?.trim() === 'ready' }
      : null;
  }

  /** Waits while the server is on its way up or down. */
  async settle() {
    await waitUntil(() => this.findServer()?.isReady ?? true, 60_000);
  }

  /** Makes the data directory, whole or not at all: an interrupted attempt leaves nothing that looks like one. */
  async initialise() {
    const { directory, superuserPassword } = this.settings;
    const user = this.#makeDirectory();
    const drafts = readdirSync(directory).filter((name) => name.startsWith('draft-'));
    drafts.forEach((name) => rmSync(join(directory, name), { recursive: true, force: true }));
    const draft = join(directory, `draft-${process.pid}`);
    const passwordFile = `${draft}.password`;
    const forget = atShutdown(() => rmSync(passwordFile, { force: true }));
    try {
      writeFileSync(passwordFile, superuserPassword, { mode: 0o600 });
      if (user) {
        chownSync(passwordFile, user.uid, user.gid);
      }
      await this.#program('initdb', [
        ...['-D', draft, '-U', 'postgres', `--pwfile=${passwordFile}`],
        ...['--auth=scram-sha-256', '--encoding=UTF8', '--locale=C.UTF-8', '--no-instructions'],
        ...(this.settings.isThrowAway ? ['--no-sync'] : []),
      ]);
    } finally {
      rmSync(passwordFile, { force: true });
      forget();
    }
    renameSync(draft, this.dataDirectory);
  }

  /** Starts the server on its port; a port taken by somebody else is an error with code 'EADDRINUSE'. */
  async start() {
    // Parts of a killed server, which has left its process file, need a moment to notice and leave the port; even
    // then PostgreSQL may refuse to start for a while.
    const patienceMs = this.#pidFileLines().length > 0 ? 10_000 : 500;
    if (!(await waitUntil(() => isPortFree(this.port), patienceMs))) {
      throw portTaken(this.port);
    }
    this.#removeForeignPidFile();
    const end = Date.now() + 15_000;
    let failure = await this.#tryStart();
    while (failure && /already exists|still in use|shared memory/.test(failure) && Date.now() < end) {
      await sleep(500);
      failure = await this.#tryStart();
    }
    if (failure && /Address already in use/.test(failure)) {
      throw portTaken(this.port);
    }
    if (failure) {
      throw new SetupError(
        `PostgreSQL did not start:\n${failure}\nIts log: ${this.logFile}`,
        databaseOutOfReach,
      );
    }
  }

  /** Stops the server if it runs; sessions that are open are ended, what they had committed is kept. */
  async stop() {
    if (this.findServer() && !(await this.#tryStop('fast'))) {
      await this.#tryStop('immediate');
    }
  }

  /** Deletes the data; the server has to be stopped. Data deleted half way is never taken for data. */
  remove() {
    if (existsSync(this.dataDirectory)) {
      const doomed = join(this.settings.directory, `draft-${process.pid}-removed`);
      renameSync(this.dataDirectory, doomed);
    }
    rmSync(this.settings.directory, { recursive: true, force: true });
  }

  /** Stops and deletes at once, for when there is no time left to wait for anything. */
  destroyNow() {
    if (this.findServer()) {
      spawnSync(this.#path('pg_ctl'), ['stop', '-m', 'immediate', '-w', '-s', '-D', this.dataDirectory], {
        cwd: this.settings.directory,
        env: serverEnvironment(),
        ...this.#owner(),
      });
    }
    rmSync(this.settings.directory, { recursive: true, force: true });
  }

  /**
   * Runs SQL as the superuser, by psql.
   * @param {string} sql may use psql's own commands
   * @param {string} [database]
   * @returns {Promise<{ code: number, stdout: string, output: string }>}
   */
  query(sql, database = 'postgres') {
    const at = ['-h', '127.0.0.1', '-p', String(this.port), '-U', 'postgres', '-d', database];
    return run(this.#path('psql'), ['-X', '-q', '-A', '-t', '-v', 'ON_ERROR_STOP=1', ...at, '-f', '-'], {
      env: { ...serverEnvironment(), PGPASSWORD: this.settings.superuserPassword, PGCONNECT_TIMEOUT: '15' },
      input: sql,
    });
  }

  /** Sets the superuser's password to the one in the settings, without needing the old one; the server has to be stopped. */
  async resetSuperuserPassword() {
    await this.#program('postgres', ['--single', '-D', this.dataDirectory, 'postgres'], {
      input: `alter role postgres password '${this.settings.superuserPassword}'\n`,
    });
  }

  /** @param {'fast' | 'immediate'} mode */
  async #tryStop(mode) {
    const args = ['stop', '-m', mode, '-w', '-t', '30', '-s', '-D', this.dataDirectory];
    return (await this.#run('pg_ctl', args)).code === 0;
  }

  /** @returns {Promise<string | null>} why it did not start */
  async #tryStart() {
    const options = [...always, ...(this.settings.isThrowAway ? throwAway : []), `port=${this.port}`];
    writeFileSync(this.logFile, '');
    this.#give(this.logFile);
    const { code, output } = await this.#run('pg_ctl', [
      ...['start', '-w', '-t', '120', '-s', '-D', this.dataDirectory, '-l', this.logFile],
      ...['-o', options.map((option) => `-c ${option}`).join(' ')],
    ]);
    return code === 0 ? null : `${output}${lastLines(readFileSync(this.logFile, 'utf8'), 20)}`;
  }

  /** A process number that now belongs to another program would keep PostgreSQL from starting for good. */
  #removeForeignPidFile() {
    const pid = Number(this.#pidFileLines()[0]);
    if (pid > 0 && isAlive(pid) && !this.findServer()) {
      rmSync(join(this.dataDirectory, 'postmaster.pid'), { force: true });
    }
  }

  #pidFileLines() {
    try {
      return readFileSync(join(this.dataDirectory, 'postmaster.pid'), 'utf8').split('\n');
    } catch {
      return [];
    }
  }

  #makeDirectory() {
    const { directory } = this.settings;
    mkdirSync(dirname(directory), { recursive: true, mode: 0o755 });
    mkdirSync(directory, { recursive: true });
    chmodSync(directory, 0o700);
    this.#give(directory);
    return this.#owner();
  }

  /** @param {string} path */
  #give(path) {
    const owner = this.#owner();
    if (owner) {
      chownSync(path, owner.uid, owner.gid);
    }
  }

  /** PostgreSQL refuses to run as root: root lets the data's owner run it, at first the system's postgres user. */
  #owner() {
    if (!isRoot()) {
      return null;
    }
    const { uid, gid } = this.exists() ? statSync(this.dataDirectory) : getPostgresUser();
    return { uid, gid };
  }

  /** @param {string} program */
  #path(program) {
    return join(getPostgresPrograms(this.dataDirectory), program);
  }

  /**
   * @param {string} program
   * @param {string[]} args
   * @param {{ input?: string }} [options]
   */
  #program(program, args, options = {}) {
    return runOrThrow(`${program} failed`, this.#path(program), args, this.#runOptions(options));
  }

  /**
   * @param {string} program
   * @param {string[]} args
   */
  #run(program, args) {
    return run(this.#path(program), args, this.#runOptions({}));
  }

  /** @param {{ input?: string }} options */
  #runOptions(options) {
    return { ...options, cwd: this.settings.directory, env: serverEnvironment(), user: this.#owner() };
  }
}

/** @param {number} port */
function portTaken(port) {
  return Object.assign(
    new SetupError(`Port ${port} on 127.0.0.1 is taken by another program.`, databaseOutOfReach),
    {
      code: 'EADDRINUSE',
    },
  );
}

/** What the caller has set for other servers must not reach ours. */
function serverEnvironment() {
  const kept = Object.entries(process.env).filter(([name]) => !name.startsWith('PG') && name !== 'TZ');
  return { ...Object.fromEntries(kept), LC_ALL: 'C.UTF-8' };
}

function getPostgresUser() {
  const line = readFileSync('/etc/passwd', 'utf8')
    .split('\n')
    .find((entry) => entry.startsWith('postgres:'));
  if (!line) {
    throw new SetupError(
      "There is no system user 'postgres'. It comes with the Debian package postgresql-common.",
    );
  }
  const [, , uid, gid] = line.split(':');
  return { uid: Number(uid), gid: Number(gid) };
}
