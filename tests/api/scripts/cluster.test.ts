import { existsSync, mkdirSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, expect, test } from 'vitest';
import {
  initCluster,
  runSql,
  startCluster,
  stopCluster,
  usableFolder,
  type Cluster,
} from '#scripts/lib/cluster.mjs';
import { postgresAccount, providePostgres } from '#scripts/lib/postgres.mjs';
import { makeDatabase, makeRoles } from '#scripts/lib/roles.mjs';

const superuserPassword = 'only-for-this-test';
let cluster: Cluster;

/** A lasting cluster, unlike the throw-away one of the other tests: a commit survives a crash. */
beforeAll(async () => {
  const { bin } = await providePostgres();
  const temporary = mkdtempSync(join(tmpdir(), 'ringstead-cluster-'));
  const base = usableFolder([temporary], postgresAccount());
  initCluster(bin, base, superuserPassword);
  cluster = await startCluster({ bin, base, superuserPassword });
  runSql(cluster, 'postgres', 'CREATE TABLE kept (n integer); INSERT INTO kept VALUES (42)');
});

afterAll(() => {
  stopCluster(cluster);
  rmSync(cluster.base, { recursive: true });
});

const lockFile = () => join(cluster.base, 'data/postmaster.pid');
const postmaster = () => Number(readFileSync(lockFile(), 'utf8').split('\n')[0]);
const kept = () => runSql(cluster, 'postgres', 'SELECT n FROM kept');

test('a running cluster is found and used', async () => {
  const { port, wasRunning } = await startCluster(cluster);
  expect({ port, wasRunning }).toEqual({ port: cluster.port, wasRunning: true });
});

test('a killed cluster starts again with its data', async () => {
  process.kill(postmaster(), 'SIGKILL');
  cluster = await startCluster(cluster);
  expect(kept()).toBe('42');
});

test('a lock file whose process number belongs to something else now does not hinder', async () => {
  const lock = readFileSync(lockFile(), 'utf8');
  stopCluster(cluster);
  writeFileSync(lockFile(), lock.replace(/^\d+/, String(process.pid)));
  cluster = await startCluster(cluster);
  expect(kept()).toBe('42');
});

test('files left by an interrupted attempt are made anew', () => {
  const { bin, account, base } = cluster;
  const other = usableFolder([join(base, 'other')], account);
  mkdirSync(join(other, 'data.new'));
  writeFileSync(join(other, 'data.new/half'), '');
  expect(initCluster(bin, other, 'a-password')).toBe(true);
  expect(existsSync(join(other, 'data/PG_VERSION'))).toBe(true);
  expect(existsSync(join(other, 'data/half'))).toBe(false);
  expect(initCluster(bin, other, 'a-password')).toBe(false);
});

test('making roles and databases again changes nothing but the passwords', () => {
  const passwords = { owner: 'aa', runTime: 'bb' };
  makeRoles(cluster, passwords);
  makeDatabase(cluster, 'twice');
  makeRoles(cluster, passwords);
  makeDatabase(cluster, 'twice');
  const roles = runSql(
    cluster,
    'postgres',
    `SELECT rolname, rolsuper, rolcreatedb, rolcreaterole FROM pg_roles
      WHERE rolname LIKE 'ringstead%' ORDER BY 1`,
  );
  expect(roles).toBe('ringstead_app|f|f|f\nringstead_owner|f|f|f');
});
