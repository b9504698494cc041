/** Progress for the person at the terminal; stdout, so that stderr holds only what went wrong. */
export function say(line) {
  process.stdout.write(`${line}\n`);
}

/** Runs a long step and says before and after what is going on and how long it took. */
export async function saySlow(line, work) {
  say(`${line} ...`);
  const started = Date.now();
  const result = await work();
  say(`  done in ${((Date.now() - started) / 1000).toFixed(1)} s`);
  return result;
}
