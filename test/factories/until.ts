import { setTimeout as pause } from 'node:timers/promises';

/** Asks again and again until the answer will do. The bound is generous: it only ends a test that would wait for ever. */
export async function until<Value>(
  what: string,
  ask: () => Promise<Value> | Value,
  good: (value: Value) => boolean,
): Promise<Value> {
  let value = await ask();
  for (let tries = 0; tries < 500; tries++) {
    if (good(value)) return value;
    await pause(50);
    value = await ask();
  }
  throw new Error(`Waited in vain until ${what}: ${JSON.stringify(value)?.slice(0, 2_000)}`);
}
