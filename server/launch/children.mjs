import { spawn } from 'node:child_process';
import { Stop } from './stop.mjs';

/** Every child that runs now, so that an interruption can end them all. */
const running = new Set();
let ending = false;

/**
 * Starts a child and waits for its end.
 *
 * `show` passes its output through; otherwise both streams are collected (the last megabyte of them). `cap` is in seconds.
 * Answers `{ code, signal, output, stdout }`, whatever the exit code.
 */
export function run(command, args, { cwd, env, input, show = false, cap } = {}) {
  if (ending) return Promise.reject(new Stop('Interrupted.'));
  return new Promise((resolve, reject) => {
    const child = spawn(command, args, {
      cwd,
      env: env ?? process.env,
      stdio: [
        input === undefined ? 'ignore' : 'pipe',
        show ? 'inherit' : 'pipe',
        show ? 'inherit' : 'pipe',
      ],
    });
    running.add(child);
    let output = '';
    let stdout = '';
    const keep = (text, more) => (text + more).slice(-1_000_000);
    child.stdout?.setEncoding('utf8').on('data', (more) => {
      output = keep(output, more);
      stdout = keep(stdout, more);
    });
    child.stderr?.setEncoding('utf8').on('data', (more) => (output = keep(output, more)));
    if (input !== undefined) child.stdin.end(input);
    const timer = cap && setTimeout(() => child.kill('SIGKILL'), cap * 1000);
    const done = () => {
      running.delete(child);
      clearTimeout(timer);
    };
    child.on('error', (error) => {
      done();
      reject(error);
    });
    child.on('close', (code, signal) => {
      done();
      if (ending) reject(new Stop('Interrupted.'));
      else resolve({ code, signal, output, stdout });
    });
  });
}

/** As `run`, but a failure is thrown with the last lines of the output. */
export async function mustRun(command, args, options = {}) {
  const result = await run(command, args, options);
  if (result.code !== 0) {
    const tail = result.output.trim().split('\n').slice(-15).join('\n');
    throw new Error(
      `${command} ${args.join(' ')} ended with ${result.code ?? result.signal}\n${tail}`,
    );
  }
  return result;
}

/** Ends every child that runs now and refuses new ones. */
export function endChildren() {
  ending = true;
  for (const child of running) child.kill('SIGTERM');
}

/** Allows children again, for those that tidy up after an interruption. */
export function allowChildren() {
  ending = false;
}
