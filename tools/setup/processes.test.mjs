import assert from 'node:assert/strict';
import { once } from 'node:events';
import { createServer } from 'node:net';
import { test } from 'node:test';
import { findFreePort, isWebPort, run, runOrThrow } from './processes.mjs';

test('keeps what a program says, and its exit code', async () => {
  const script = "process.stdout.write('said'); process.stderr.write('complained'); process.exitCode = 4;";
  const { code, stdout, output } = await run(process.execPath, ['-e', script]);
  assert.equal(code, 4);
  assert.equal(stdout, 'said');
  assert.match(output, /complained/);
});

test('tells a program that is not there by code 127, one that takes too long by 124', async () => {
  assert.equal((await run('no-such-program', [])).code, 127);
  const endless = await run(process.execPath, ['-e', 'setInterval(() => undefined, 1000)'], {
    timeLimitMs: 200,
  });
  assert.equal(endless.code, 124);
});

test('turns a failure into an error that carries what the program said', async () => {
  await assert.rejects(runOrThrow('It failed', process.execPath, ['-e', "throw new Error('for a reason')"]), {
    message: /^It failed:[^]*for a reason/,
  });
});

test('finds the next port that is free, and none that browsers refuse', async () => {
  const server = createServer().listen(0, '127.0.0.1');
  await once(server, 'listening');
  const address = server.address();
  const taken = typeof address === 'object' && address ? address.port : 0;
  assert.ok((await findFreePort(taken)) > taken);
  server.close();
  assert.ok((await findFreePort(4190)) > 4190);
  assert.deepEqual([80, 4180, 4190, 6000, 65_536, 4180.5].map(isWebPort), [
    false,
    true,
    false,
    false,
    false,
    false,
  ]);
});
