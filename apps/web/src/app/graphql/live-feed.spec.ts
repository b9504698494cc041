import { TestBed } from '@angular/core/testing';
import { Apollo } from 'apollo-angular';
import type { Client } from 'graphql-ws';
import { of, throwError } from 'rxjs';
import type { Subscriber } from './follow';
import { LiveFeed, OPEN_SOCKET, type FloorChange } from './live-feed';
import type { SocketEvents } from './live-socket';
import { LostSession } from './lost-session';

/** Stands for the socket's client: keeps the last subscription and what it asked for. */
class FakeClient {
  events!: SocketEvents;
  payload!: { variables?: Record<string, unknown> };
  sink!: Parameters<Subscriber['subscribe']>[1];
  subscriptions = 0;
  disposed = false;

  subscribe(...[payload, sink]: Parameters<Subscriber['subscribe']>): () => void {
    this.payload = payload;
    this.sink = sink;
    this.subscriptions += 1;
    return () => undefined;
  }
  dispose(): void {
    this.disposed = true;
  }
  say(cursor: string, more: Partial<FloorChange> = {}): void {
    const change = {
      cursor,
      now: '2026-12-01T13:06:00Z',
      reset: false,
      shopChanged: false,
      by: null,
      watchers: 3,
      batches: [],
      ...more,
    };
    this.sink.next({ data: { floorChanges: change } });
  }
}

function setUp(viewer: () => unknown = () => of({ data: { viewer: { email: 'a@example.com' } } })) {
  const client = new FakeClient();
  TestBed.configureTestingModule({
    providers: [
      { provide: Apollo, useValue: { query: viewer } },
      {
        provide: OPEN_SOCKET,
        useValue: (events: SocketEvents) => {
          client.events = events;
          return Promise.resolve(client as unknown as Client);
        },
      },
    ],
  });
  const feed = TestBed.inject(LiveFeed);
  const changes: FloorChange[] = [];
  let lost = 0;
  feed.changes$.subscribe((change) => changes.push(change));
  TestBed.inject(LostSession).happened$.subscribe(() => (lost += 1));
  return { client, feed, changes, lost: () => lost };
}

const settle = (): Promise<unknown> => vi.advanceTimersByTimeAsync(500);

describe('LiveFeed', () => {
  beforeEach(() => {
    vi.useFakeTimers();
  });
  afterEach(() => {
    vi.useRealTimers();
  });

  it('follows from a snapshot and is connected once what was missed has come', async () => {
    const { client, feed, changes } = setUp();
    feed.resumeAt('7');
    await settle();
    expect(client.payload.variables).toEqual({ after: '7' });
    client.events.connected(false);
    expect(feed.state()).toBe('catching-up');
    client.say('8');
    await settle();
    expect(feed.state()).toBe('connected');
    expect(feed.watchers()).toBe(3);
    expect(changes.map((change) => change.cursor)).toEqual(['8']);
  });

  it('lets a page that names its place go before the shell, with one subscription', async () => {
    const { client, feed } = setUp();
    feed.keep();
    feed.resumeAt('7');
    await vi.advanceTimersByTimeAsync(5_000);
    expect(client.subscriptions).toBe(1);
    feed.resumeAt('7');
    await settle();
    expect(client.subscriptions).toBe(1);
  });

  it('follows from now on when no page asks, and tells of a gap that it cannot fill', async () => {
    const { client, feed, changes } = setUp();
    feed.keep();
    await vi.advanceTimersByTimeAsync(1_000);
    expect(client.payload.variables).toEqual({ after: null });
    client.events.connected(false);
    client.events.closed(1006);
    client.events.connected(true);
    expect(changes.map((change) => change.reset)).toEqual([true]);
  });

  it('says since when the line is down, and keeps to the first moment', async () => {
    const { client, feed } = setUp();
    feed.resumeAt('7');
    await settle();
    client.events.connected(false);
    client.say('8');
    await settle();
    client.events.closed(1006);
    const since = feed.since();
    expect(feed.state()).toBe('offline');
    await vi.advanceTimersByTimeAsync(60_000);
    client.events.closed(1006);
    expect(feed.since()).toBe(since);
    client.events.connected(true);
    await settle();
    expect([feed.state(), feed.since()]).toEqual(['connected', null]);
  });

  it('ends when a refused socket turns out to belong to a session that is gone', async () => {
    const { client, feed, lost } = setUp(() => of({ data: { viewer: null } }));
    feed.resumeAt('7');
    await settle();
    client.events.closed(4403);
    await settle();
    expect([lost(), client.disposed, feed.state()]).toEqual([1, true, 'off']);
  });

  it('goes on when the session is still there or nobody can say', async () => {
    for (const viewer of [undefined, () => throwError(() => new Error('no network'))]) {
      TestBed.resetTestingModule();
      const { client, feed, lost } = setUp(viewer);
      feed.resumeAt('7');
      await settle();
      client.events.closed(4403);
      await settle();
      expect([lost(), client.disposed, feed.state()]).toEqual([0, false, 'offline']);
    }
  });

  it('does not come back to a subscription that this person may not have', async () => {
    const { client, feed } = setUp();
    feed.resumeAt('7');
    await settle();
    client.sink.error([{ message: 'no', extensions: { code: 'FORBIDDEN' } }]);
    await vi.advanceTimersByTimeAsync(120_000);
    expect([client.subscriptions, feed.state()]).toEqual([1, 'off']);
  });

  it('comes back, where it was, after an error that closed only the subscription', async () => {
    const { client, feed } = setUp();
    feed.resumeAt('7');
    await settle();
    client.say('9');
    client.sink.error([{ message: 'oops', extensions: { code: 'INTERNAL' } }]);
    await vi.advanceTimersByTimeAsync(10_000);
    expect(client.subscriptions).toBe(2);
    expect(client.payload.variables).toEqual({ after: '9' });
  });
});
