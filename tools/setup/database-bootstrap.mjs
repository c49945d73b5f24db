import { SetupError, databaseOutOfReach } from './workspace.mjs';

/** @typedef {{ ownerPassword: string, applicationPassword: string }} RolePasswords */
/** @typedef {import('./database-cluster.mjs').DatabaseCluster} DatabaseCluster */

/**
 * Makes the two roles, or sets right what an interrupted attempt has left: brakeven_owner owns the schema,
 * brakeven_app cannot get round row-level security.
 * @param {DatabaseCluster} cluster
 * @param {RolePasswords} passwords
 */
export async function ensureRoles(cluster, { ownerPassword, applicationPassword }) {
  await execute(
    cluster,
    `
    select 'create role ' || name from unnest(array['brakeven_owner', 'brakeven_app']) as name
      where not exists (select from pg_roles where rolname = name)
    \\gexec
    alter role brakeven_owner login createdb nosuperuser nocreaterole nobypassrls noreplication password '${ownerPassword}';
    alter role brakeven_app login nocreatedb nosuperuser nocreaterole nobypassrls noreplication password '${applicationPassword}';
    `,
  );
}

/**
 * Makes a database that belongs to brakeven_owner and that only brakeven_app may use besides.
 * @param {DatabaseCluster} cluster
 * @param {string} name
 */
export async function ensureDatabase(cluster, name) {
  await execute(
    cluster,
    `
    select 'create database ${name} owner brakeven_owner template template0 encoding ''UTF8'' locale ''C.UTF-8'''
      where not exists (select from pg_database where datname = '${name}')
    \\gexec
    alter database ${name} set timezone = 'UTC';
    revoke all on database ${name} from public;
    grant connect, temporary on database ${name} to brakeven_app;
    `,
  );
}

/**
 * Makes a database anew, empty.
 * @param {DatabaseCluster} cluster
 * @param {string} name
 */
export async function recreateDatabase(cluster, name) {
  await execute(cluster, `drop database if exists ${name} with (force);`);
  await ensureDatabase(cluster, name);
}

/**
 * @param {DatabaseCluster} cluster
 * @param {string} sql
 */
async function execute(cluster, sql) {
  const { code, output } = await cluster.query(sql);
  if (code !== 0) {
    throw new SetupError(
      `The database could not be prepared:\n${output}Its log: ${cluster.logFile}`,
      databaseOutOfReach,
    );
  }
}
