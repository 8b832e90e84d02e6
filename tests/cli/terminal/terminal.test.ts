import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { expect, it } from 'vitest';

// POSIX: a write to a pipe that nobody reads any more fails with EPIPE (write(2)).
it('says nothing when the reader of its output has gone', async () => {
  const child = spawn(process.execPath, ['bin/strutwright.js', 'catalogue', '--json'], {
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  child.stdout.destroy();
  let said = '';
  child.stderr.on('data', (chunk) => {
    said += chunk;
  });
  const [status] = await once(child, 'close');
  expect(said).toBe('');
  expect(status).toBe(0);
});
