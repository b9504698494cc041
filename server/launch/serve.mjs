import { spawn } from 'node:child_process';
import { root } from './root.mjs';
import { SETUP_EXIT_CODE, Stop } from './stop.mjs';

/** The server has 25 s to end what it does; after this it is ended. */
const CAP_MS = 28_000;

/**
 * Starts the server and answers `{ ready, ended, stop }`: `ready` resolves with the address when it listens, `ended` when it
 * is gone, with a Stop when that was not asked for. `env` is added to this process's.
 *
 * It runs in a process group of its own, so that a Ctrl-C at the terminal reaches only the launcher, which then ends things
 * in their order. When the launcher is killed the server sees its channel close and ends by itself.
 */
export function serve(args, env) {
  const child = spawn(process.execPath, args, {
    cwd: root,
    env: { ...process.env, ...env },
    stdio: ['ignore', 'inherit', 'inherit', 'ipc'],
    detached: true,
  });
  let asked = false;
  const ended = new Promise((resolve) => {
    child.on('error', (error) => resolve(new Stop(`The server did not start: ${error.message}`)));
    child.on('exit', (code, signal) => resolve(asked ? null : whyEnded(code, signal)));
  });
  const ready = new Promise((resolve, reject) => {
    child.on('message', (message) => {
      if (message?.ready) resolve(message.url);
    });
    void ended.then((problem) => reject(problem ?? new Stop('Interrupted.')));
  });
  ready.catch(() => {});
  const stop = async () => {
    asked = true;
    child.kill('SIGTERM');
    const timer = setTimeout(() => child.kill('SIGKILL'), CAP_MS);
    await ended;
    clearTimeout(timer);
  };
  return { ready, ended, stop, pid: child.pid };
}

function whyEnded(code, signal) {
  // The server has already said its sentence.
  if (code === SETUP_EXIT_CODE) return new Stop('');
  return new Stop(
    `The server ended by itself (${signal ?? `exit code ${code}`}); its last words stand above.`,
  );
}
