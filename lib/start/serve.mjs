import { spawn } from 'node:child_process';
import { createServer } from 'node:net';
import { NEXT_BIN, ROOT } from './run.mjs';
import { fail } from './say.mjs';

const READY_WITHIN_MS = 60_000;
/** Open streams would keep the server for ever: after this it is ended. Nothing acknowledged is lost by it. */
const GRACE_MS = 2_000;

/** Whether something answers `/api/health` on the port as this application does. */
async function isTercet(port) {
  try {
    const answer = await fetch(`http://127.0.0.1:${port}/api/health`, { signal: AbortSignal.timeout(2_000) });
    return (await answer.json()).ok === true;
  } catch {
    return false;
  }
}

/** Refuses a port that another program holds, and says which kind of program. */
export async function requireFreePort(port) {
  const error = await new Promise((resolve) => {
    const probe = createServer();
    probe.once('error', resolve);
    probe.listen({ port, host: '0.0.0.0' }, () => probe.close(() => resolve(null)));
  });
  if (!error) return;
  if (error.code === 'EACCES') fail(`Port ${port} may not be used by this user. Choose one above 1023: PORT=3000 npm start`);
  if (error.code !== 'EADDRINUSE') fail(`Port ${port} can't be used: ${error.message}`);
  fail(
    (await isTercet(port))
      ? `Tercet runs already on port ${port}. One server at a time may use a database: stop that one, or use it.`
      : `Port ${port} is taken by another program. Choose another: PORT=${port + 1} npm start`,
  );
}

/**
 * Starts the production server as a child and waits until it answers.
 * @param {number} port
 * @returns the child, and a promise of its exit code
 */
export async function serve(port) {
  const child = spawn(process.execPath, [NEXT_BIN, 'start', '-p', String(port), '-H', '0.0.0.0'], {
    cwd: ROOT,
    // The channel tells the server when this process is gone.
    stdio: ['ignore', 'pipe', 'inherit', 'ipc'],
    env: { ...process.env, NODE_ENV: 'production', NEXT_TELEMETRY_DISABLED: '1', PORT: String(port) },
  });
  let isReady = false;
  // The framework's own banner names an address that phones can't open.
  child.stdout.on('data', (text) => isReady && process.stdout.write(text));
  const ended = new Promise((resolve) => child.once('close', (code) => resolve(code ?? 0)));
  endWith(child, ended);

  let exitCode;
  void ended.then((code) => (exitCode = code));
  const deadline = Date.now() + READY_WITHIN_MS;
  while (!(await isTercet(port))) {
    if (exitCode !== undefined) process.exit(exitCode || 1);
    if (Date.now() > deadline) {
      child.kill('SIGKILL');
      fail(`The server did not answer within ${READY_WITHIN_MS / 1000} seconds.`);
    }
    await new Promise((resolve) => setTimeout(resolve, 100));
  }
  isReady = true;
  return { ended };
}

/** Passes the end on to the server: first politely, then by force. */
function endWith(child, ended) {
  for (const signal of ['SIGTERM', 'SIGINT', 'SIGHUP']) {
    process.on(signal, () => {
      child.kill('SIGTERM');
      setTimeout(() => child.kill('SIGKILL'), GRACE_MS).unref();
      void ended.then(() => process.exit(0));
    });
  }
}
