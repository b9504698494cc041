/**
 * Keeps the display from going dark while the page is seen, where the browser can (over https or on this machine). Gives
 * back how to stop.
 */
export function stayAwake(): () => void {
  let lock: WakeLockSentinel | null = null;
  let stopped = false;
  const ask = async (): Promise<void> => {
    if (stopped || document.visibilityState !== 'visible' || !('wakeLock' in navigator)) return;
    try {
      lock = await navigator.wakeLock.request('screen');
      if (stopped) await lock.release();
    } catch {
      // Refused, as on a battery that is nearly empty: the device's own setting decides.
    }
  };
  // The browser lets go whenever the page is hidden.
  const again = (): void => void ask();
  document.addEventListener('visibilitychange', again);
  void ask();
  return () => {
    stopped = true;
    document.removeEventListener('visibilitychange', again);
    void lock?.release();
  };
}
