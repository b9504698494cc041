import { inject, Injectable, InjectionToken, signal } from '@angular/core';
import { Apollo } from 'apollo-angular';
import { print } from 'graphql/language/printer';
import type { Client } from 'graphql-ws';
import { firstValueFrom, Subject } from 'rxjs';
import { Bearer } from './bearer';
import { follow, type Following } from './follow';
import { FloorChangesDocument, ViewerDocument } from './generated/graphql';
import type { FloorChangesSubscription } from './generated/graphql';
import type { SocketEvents } from './live-socket';
import { LostSession } from './lost-session';
import { ServerClock } from './server-clock';

export type FloorChange = FloorChangesSubscription['floorChanges'];
/** `off`: nobody follows, because nobody asked or because this person may not. */
export type LiveState = 'off' | 'connected' | 'catching-up' | 'offline';

/** Opens the socket. Its script is fetched only now: signing in needs none of it. */
export const OPEN_SOCKET = new InjectionToken<(events: SocketEvents) => Promise<Client>>(
  'OPEN_SOCKET',
  {
    providedIn: 'root',
    factory: () => async (events) => (await import('./live-socket')).openSocket(events),
  },
);

/** Milliseconds of silence after which a fresh connection counts as caught up: what was missed comes at once. */
const SETTLED_AFTER = 400;
/** Milliseconds that a page has to say from where it wants to follow, before the shell follows from now on. */
const GRACE = 800;
const FORBIDDEN = 4403;

/**
 * The floor's changes, in order, each once, across lost connections.
 *
 * A page that shows a snapshot subscribes to `changes$` and calls `resumeAt(cursor of the snapshot)`. A change with
 * `reset` means: read the snapshot again, then `resumeAt` its cursor.
 */
@Injectable({ providedIn: 'root' })
export class LiveFeed {
  private readonly apollo = inject(Apollo);
  private readonly bearer = inject(Bearer);
  private readonly clock = inject(ServerClock);
  private readonly lostSession = inject(LostSession);
  private readonly openSocket = inject(OPEN_SOCKET);

  private readonly stateNow = signal<LiveState>('off');
  private readonly sinceNow = signal<number | null>(null);
  private readonly heardAtNow = signal<number | null>(null);
  private readonly watchersNow = signal<number | null>(null);
  private readonly changes = new Subject<FloorChange>();
  private socket: Promise<Client> | null = null;
  private following: Following | null = null;
  private starts = 0;
  private failures = 0;
  private settle: ReturnType<typeof setTimeout> | undefined;
  private grace: ReturnType<typeof setTimeout> | undefined;

  readonly state = this.stateNow.asReadonly();
  /** Since when the line is down, milliseconds on the server's clock; null while it is up. */
  readonly since = this.sinceNow.asReadonly();
  /** When the server last gave a sign of life, milliseconds on its clock; null before the first. */
  readonly heardAt = this.heardAtNow.asReadonly();
  /** How many screens and browsers watch; null until the server has said. */
  readonly watchers = this.watchersNow.asReadonly();
  readonly changes$ = this.changes.asObservable();

  /** Follows from now on, unless a page asks for a place of its own within a moment. */
  keep(): void {
    if (this.following || this.grace) return;
    this.grace = setTimeout(() => void this.start(null), GRACE);
  }

  /** Follows from the place at which a snapshot was read; a snapshot that knows how many watch may say so. */
  resumeAt(cursor: string, watchers?: number): void {
    if (watchers !== undefined) this.watchersNow.set(watchers);
    if (this.following?.cursor() === cursor) return;
    void this.start(cursor);
  }

  /** Ends it, as after signing out. */
  stop(): void {
    this.starts += 1;
    clearTimeout(this.grace);
    clearTimeout(this.settle);
    this.grace = undefined;
    this.following?.stop();
    this.following = null;
    const socket = this.socket;
    this.socket = null;
    // Disposing rejects when the socket it ends was still opening or already closing: it is ended either way.
    socket?.then((client) => client.dispose()).catch(() => undefined);
    this.stateNow.set('off');
    this.sinceNow.set(null);
  }

  private async start(after: string | null): Promise<void> {
    const start = (this.starts += 1);
    clearTimeout(this.grace);
    this.grace = undefined;
    // Stopping the last operation closes a lazy socket, so the new one begins before the old one ends.
    const before = this.following;
    if (this.stateNow() === 'off') this.stateNow.set('catching-up');
    this.socket ??= this.open();
    let socket: Client;
    try {
      socket = await this.socket;
    } catch {
      // The piece of script that holds the socket could not be fetched: the line is down.
      this.socket = null;
      this.lineIsDown();
      this.retry(start, after);
      return;
    }
    if (start !== this.starts) return;
    this.following = follow<FloorChange>(
      socket,
      { query: print(FloorChangesDocument), operationName: 'FloorChanges', field: 'floorChanges' },
      after,
      {
        item: (change) => this.take(change),
        failed: (reason) => this.failed(start, reason),
        ended: () => this.retry(start, this.following?.cursor() ?? after),
      },
    );
    before?.stop();
  }

  private open(): Promise<Client> {
    return this.openSocket({
      params: () => {
        const token = this.bearer.token();
        return token ? { authorization: `Bearer ${token}` } : {};
      },
      heard: () => this.heardAtNow.set(this.clock.now()),
      connected: (again) => {
        this.heardAtNow.set(this.clock.now());
        this.stateNow.set('catching-up');
        this.settleSoon();
        // Followed from now on and never heard anything: what happened in between is unknown.
        if (again && this.following?.cursor() === null) this.changes.next(this.unknownGap());
      },
      closed: (code) => {
        this.lineIsDown();
        if (code === FORBIDDEN) void this.askSession();
      },
    });
  }

  private take(change: FloorChange): void {
    this.failures = 0;
    this.clock.observe(change.now);
    this.heardAtNow.set(this.clock.now());
    this.watchersNow.set(change.watchers);
    if (this.stateNow() !== 'connected') this.settleSoon();
    this.changes.next(change);
  }

  private settleSoon(): void {
    clearTimeout(this.settle);
    this.settle = setTimeout(() => {
      this.stateNow.set('connected');
      this.sinceNow.set(null);
    }, SETTLED_AFTER);
  }

  private lineIsDown(): void {
    clearTimeout(this.settle);
    if (this.stateNow() === 'off') return;
    this.stateNow.set('offline');
    if (this.sinceNow() === null) this.sinceNow.set(this.clock.now());
  }

  private failed(start: number, reason: unknown): void {
    if (start !== this.starts) return;
    const after = this.following?.cursor() ?? null;
    this.following = null;
    if (hasCode(reason, 'FORBIDDEN')) {
      this.stop();
      return;
    }
    if (hasCode(reason, 'UNAUTHENTICATED')) void this.askSession();
    this.lineIsDown();
    this.retry(start, after);
  }

  private retry(start: number, after: string | null): void {
    const wait = Math.min(30_000, 1_000 * 2 ** Math.min(this.failures, 5)) * (0.5 + Math.random());
    this.failures += 1;
    setTimeout(() => {
      if (start === this.starts) void this.start(after);
    }, wait);
  }

  /** A refused socket says only that; whether the session is gone is asked over HTTP, and if it is, there is an end. */
  private async askSession(): Promise<void> {
    if (this.bearer.token() !== null) return;
    try {
      const answer = await firstValueFrom(this.apollo.query({ query: ViewerDocument }));
      if (answer.data && answer.data.viewer === null) {
        this.stop();
        this.lostSession.tell();
      }
    } catch {
      // The server cannot be reached: nothing is known, the socket goes on trying.
    }
  }

  private unknownGap(): FloorChange {
    return {
      cursor: '',
      now: new Date(this.clock.now()).toISOString(),
      reset: true,
      shopChanged: true,
      by: null,
      watchers: this.watchersNow() ?? 0,
      batches: [],
    };
  }
}

function hasCode(reason: unknown, code: string): boolean {
  return (
    Array.isArray(reason) &&
    reason.some(
      (each: { extensions?: { code?: unknown } } | null) => each?.extensions?.code === code,
    )
  );
}
