import assert from 'node:assert/strict';
import { once } from 'node:events';
import { existsSync, mkdtempSync, writeFileSync } from 'node:fs';
import { createServer } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { after, test } from 'node:test';
import { chooseDatabasePort, isRoot, newPassword } from './configuration.mjs';
import { ensureDatabase, ensureRoles, recreateDatabase } from './database-bootstrap.mjs';
import { DatabaseCluster } from './database-cluster.mjs';

const settings = {
  directory: mkdtempSync(join(isRoot() ? '/tmp' : tmpdir(), `brakeven-test-${process.pid}-`)),
  port: await chooseDatabasePort(),
  superuserPassword: newPassword(),
  isThrowAway: true,
};
const cluster = new DatabaseCluster(settings);
const passwords = { ownerPassword: newPassword(), applicationPassword: newPassword() };
after(() => cluster.destroyNow());

/** @param {string} sql */
async function ask(sql) {
  const { code, stdout, output } = await cluster.query(sql);
  assert.equal(code, 0, output);
  return stdout.trim();
}

test('starts on its port of 127.0.0.1, by password only, in UTC and UTF-8', async () => {
  await cluster.initialise();
  await cluster.start();
  assert.equal(cluster.findServer()?.port, settings.port);
  assert.equal(await ask('show listen_addresses'), '127.0.0.1');
  assert.equal(await ask('show unix_socket_directories'), '');
  assert.equal(await ask('show timezone'), 'UTC');
  assert.equal(
    await ask("select string_agg(distinct auth_method, ',') from pg_hba_file_rules"),
    'scram-sha-256',
  );
  const stranger = new DatabaseCluster({ ...settings, superuserPassword: newPassword() });
  assert.match((await stranger.query('select 1')).output, /password authentication failed/);
});

test('has two roles that cannot get round row-level security, however often it is prepared', async () => {
  await ensureRoles(cluster, passwords);
  await ensureDatabase(cluster, 'brakeven');
  await ensureRoles(cluster, passwords);
  await ensureDatabase(cluster, 'brakeven');
  const roles = await ask(
    "select rolname, rolsuper, rolbypassrls, rolcreatedb from pg_roles where rolname like 'brakeven%' order by 1",
  );
  assert.equal(roles, 'brakeven_app|f|f|f\nbrakeven_owner|f|f|t');
  const database = await ask(
    "select pg_get_userbyid(datdba), pg_encoding_to_char(encoding), datcollate from pg_database where datname = 'brakeven'",
  );
  assert.equal(database, 'brakeven_owner|UTF8|C.UTF-8');
});

test('makes a database anew while somebody is connected to the old one', async () => {
  const sleeper = cluster.query('select pg_sleep(60)', 'brakeven');
  while ((await ask("select count(*) from pg_stat_activity where datname = 'brakeven'")) === '0');
  await recreateDatabase(cluster, 'brakeven');
  assert.notEqual((await sleeper).code, 0);
});

test('starts again after its server was killed, with what had been committed', async () => {
  await ask('set synchronous_commit = on; create table kept as select 42 as answer');
  process.kill(cluster.findServer()?.pid ?? 0, 'SIGKILL');
  await cluster.settle();
  await cluster.start();
  assert.equal(await ask('select answer from kept'), '42');
});

test('starts although the process file names a process of another program', async () => {
  await cluster.stop();
  assert.equal(cluster.findServer(), null);
  writeFileSync(join(cluster.dataDirectory, 'postmaster.pid'), `${process.pid}\n${cluster.dataDirectory}\n`);
  await cluster.start();
  assert.equal(await ask('select answer from kept'), '42');
});

test('admits a new superuser password without the old one', async () => {
  await cluster.stop();
  settings.superuserPassword = newPassword();
  await cluster.resetSuperuserPassword();
  await cluster.start();
  assert.equal(await ask('select 1'), '1');
});

test('refuses a port that another program holds', async () => {
  await cluster.stop();
  const server = createServer().listen(settings.port, '127.0.0.1');
  await once(server, 'listening');
  await assert.rejects(cluster.start(), { code: 'EADDRINUSE', message: /taken by another program/ });
  server.close();
});

test('leaves nothing behind when it is removed', () => {
  cluster.remove();
  assert.equal(existsSync(settings.directory), false);
});
