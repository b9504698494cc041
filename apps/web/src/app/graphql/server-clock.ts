import { Injectable, computed, inject, signal, DestroyRef } from '@angular/core';
import { betterOffset } from './server-offset';

/**
 * The server's clock, for countdowns and ages. The device's own time of day is never asked: every answer of the server
 * that carries its time is handed to `observe`, and between them a monotonic counter goes on.
 */
@Injectable({ providedIn: 'root' })
export class ServerClock {
  private offset: number | null = null;
  private readonly ticked = signal(0);

  /** Milliseconds since the epoch, renewed each second; 0 until the server has said its time once. */
  readonly now = this.ticked.asReadonly();
  /** The same, cut to the minute: what most of a screen needs, so that most of it is not repainted each second. */
  readonly minute = computed(() => Math.floor(this.ticked() / 60_000) * 60_000);
  readonly known = computed(() => this.ticked() !== 0);

  constructor() {
    const timer = setInterval(() => this.tick(), 1_000);
    inject(DestroyRef).onDestroy(() => clearInterval(timer));
  }

  /** Takes the server's time out of an answer, as ISO 8601. */
  observe(serverTime: string): void {
    const at = Date.parse(serverTime);
    if (Number.isNaN(at)) return;
    this.offset = betterOffset(this.offset, at, performance.now());
    this.tick();
  }

  private tick(): void {
    if (this.offset !== null) this.ticked.set(Math.round(this.offset + performance.now()));
  }
}
