import type { Services } from './services';

const WINDOW_MS = 60_000;
/** Addresses that are remembered at once; beyond it the oldest are forgotten. */
const MOST_ADDRESSES = 20_000;

interface Window {
  startedAt: number;
  count: number;
}

/** Counts of one server process. They need not survive it, and with several processes the limits add up. */
const windowsOf = new WeakMap<Services, Map<string, Window>>();

/**
 * Counts a call that strangers may make, by operation and the caller's address. Answers 0 while there are `most` or
 * fewer in a minute, else the seconds until the next is heard.
 */
export function waitSeconds(
  services: Services,
  operation: string,
  address: string,
  most = 60,
): number {
  const now = services.now().getTime();
  let windows = windowsOf.get(services);
  if (!windows) windowsOf.set(services, (windows = new Map<string, Window>()));
  const key = `${operation} ${address}`;
  const window = windows.get(key);
  if (!window || now - window.startedAt >= WINDOW_MS || now < window.startedAt) {
    windows.delete(key);
    // A map keeps the order in which keys came: the first is the one that began longest ago.
    if (windows.size >= MOST_ADDRESSES) {
      for (const oldest of windows.keys()) {
        windows.delete(oldest);
        break;
      }
    }
    windows.set(key, { startedAt: now, count: 1 });
    return 0;
  }
  window.count += 1;
  return window.count <= most ? 0 : Math.ceil((window.startedAt + WINDOW_MS - now) / 1000);
}
