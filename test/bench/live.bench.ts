import { readFile } from 'node:fs/promises';
import { createClient, type Client } from 'graphql-ws';
import { chromium, type Browser } from 'playwright-core';
import { WebSocket } from 'ws';
import { DEMO_OWNER, DEMO_PASSWORD } from '../../server/demo/cast';
import { freshDatabase } from '../database';
import { chromiumPath, startServer, type TestServer } from '../server';
import { startThrowAway } from '../throw-away.mjs';
import { signIn, type Signed } from './api';
import { spread } from './quantiles';

/*
 * How long a move takes to reach other screens: from sending the mutation until a graphql-ws client has parsed the event,
 * on loopback; the clients run in this process, so their own work counts too. One real browser is among them.
 */

const MOVES = 40;
/** Moves before the counting begins: the first ones find nothing compiled. */
const WARM_UP = 5;
/** Between two moves, so that the plan that follows each is made before the next: people do not move twice a second. */
const PAUSE_MS = 1_000;
/** Sockets that one session may have. */
const EACH = 50;

const CHANGES = `subscription Follow($after: Cursor) {
  floorChanges(after: $after) {
    cursor now reset shopChanged by watchers
    batches {
      id code version designId boards panels blocks routeId dueDate shipBy place releasedAt shippedAt assignedTo
      runs { step piece startedAt startedBy finishedAt finishedBy cutAt cutBy }
      occupations { resource isClamps amount step piece since }
      overrides { id step piece by at reason seen }
      forecast { readyAt nextStartAt slackMinutes slackDays }
      undo { event by until }
    }
  }
}`;

interface Change {
  floorChanges: { batches: { id: string; version: number }[] };
}

/** When each version of the moved batch was sent, and what to do when it arrives. */
class Watch {
  readonly delays: number[] = [];
  private sent = new Map<number, number>();
  private seen = new Map<number, number>();

  constructor(private readonly batchId: string) {}

  send(version: number): void {
    this.sent.set(version, performance.now());
  }

  heard(change: Change): void {
    const now = performance.now();
    for (const { id, version } of change.floorChanges.batches) {
      if (id !== this.batchId) continue;
      const sent = this.sent.get(version);
      // The plan that follows tells of the same version again: only the first time counts, client by client.
      if (sent === undefined) continue;
      this.delays.push(now - sent);
      this.seen.set(version, (this.seen.get(version) ?? 0) + 1);
    }
  }

  count(version: number): number {
    return this.seen.get(version) ?? 0;
  }
}

function openClient(url: string, cookie: string): Client {
  class WithCookie extends WebSocket {
    constructor(address: string, protocols?: string | string[]) {
      super(address, protocols, { headers: { cookie } });
    }
  }
  return createClient({
    url: `${url.replace('http', 'ws')}/graphql`,
    webSocketImpl: WithCookie,
    lazy: false,
    retryAttempts: 3,
  });
}

async function follow(client: Client, heard: (change: Change) => void): Promise<void> {
  const versions = new Set<string>();
  await new Promise<void>((resolve, reject) => {
    client.on('connected', () => setTimeout(resolve, 50));
    client.subscribe<Change>(
      { query: CHANGES, variables: { after: null } },
      {
        next: ({ data }) => {
          if (!data) return;
          const fresh = data.floorChanges.batches.filter(
            (batch) => !versions.has(`${batch.id} ${batch.version}`),
          );
          for (const batch of fresh) versions.add(`${batch.id} ${batch.version}`);
          heard({ floorChanges: { batches: fresh } });
        },
        error: reject,
        complete: () => undefined,
      },
    );
  });
}

/** In the page: notes when each version of each batch was parsed. */
const NOTE_ARRIVALS = `
  window.heard = [];
  const Native = window.WebSocket;
  window.WebSocket = class extends Native {
    constructor(address, protocols) {
      super(address, protocols);
      this.addEventListener('message', (event) => {
        const change = JSON.parse(event.data).payload?.data?.floorChanges;
        for (const batch of change?.batches ?? []) {
          window.heard.push([batch.id + ' ' + batch.version, Date.now()]);
        }
      });
    }
  };`;

async function openBrowser(url: string, cookie: string): Promise<Browser> {
  const browser = await chromium.launch({
    executablePath: chromiumPath(),
    args: ['--no-sandbox', '--disable-gpu', '--disable-background-networking', '--disable-sync'],
  });
  const context = await browser.newContext();
  const [name = '', value = ''] = cookie.split('=');
  await context.addCookies([{ name, value, url }]);
  const page = await context.newPage();
  await page.addInitScript({ content: NOTE_ARRIVALS });
  await page.goto(`${url}/floor`);
  await page.waitForTimeout(4_000);
  return browser;
}

async function residentMegabytes(pid: number): Promise<number> {
  const status = await readFile(`/proc/${pid}/status`, 'utf8');
  return Number(/VmRSS:\s+(\d+)/.exec(status)?.[1] ?? 0) / 1024;
}

async function measure(
  server: TestServer,
  mover: Signed,
  sockets: number,
  withBrowser: boolean,
): Promise<void> {
  const { floor } = await mover.ask<{
    floor: { batches: { id: string; version: number; place: string }[] };
  }>('{ floor { batches { id version place } } }');
  const batch = floor.batches.find((each) => each.place === 'QUEUED' || each.place === 'BLANK');
  if (!batch) throw new Error('The demo has no batch to move to and fro.');
  const watch = new Watch(batch.id);
  const sessions: Signed[] = [];
  while (sessions.length * EACH < sockets) {
    sessions.push(await signIn(server.url, DEMO_OWNER.email, DEMO_PASSWORD));
  }
  const clients = Array.from({ length: sockets }, (_, i) =>
    openClient(server.url, sessions[Math.floor(i / EACH)]?.cookie ?? ''),
  );
  await Promise.all(clients.map((client) => follow(client, (change) => watch.heard(change))));
  const browser = withBrowser ? await openBrowser(server.url, mover.cookie) : null;
  const sentAt = new Map<string, number>();
  let { version, place } = batch;
  for (let move = -WARM_UP; move < MOVES; move++) {
    const to: string = place === 'QUEUED' ? 'BLANK' : 'QUEUED';
    if (move >= 0) {
      watch.send(version + 1);
      sentAt.set(`${batch.id} ${version + 1}`, Date.now());
    }
    const { moveBatch } = await mover.ask<{
      moveBatch: { batch: { version: number; place: string }; problems: { sentence: string }[] };
    }>(
      `mutation ($input: MoveBatchInput!) {
        moveBatch(input: $input) { batch { version place } problems { sentence } }
      }`,
      { input: { batchId: batch.id, version, to, reason: 'measuring how long this takes' } },
    );
    if (moveBatch.problems.length > 0) throw new Error(moveBatch.problems[0]?.sentence);
    ({ version, place } = moveBatch.batch);
    for (let wait = 0; wait < 100 && move >= 0 && watch.count(version) < sockets; wait++) {
      await new Promise((resolve) => setTimeout(resolve, 20));
    }
    await new Promise((resolve) => setTimeout(resolve, PAUSE_MS));
  }
  const missing = MOVES * sockets - watch.delays.length;
  console.log(`${sockets} sockets, ${MOVES} moves: ${spread(watch.delays)}, ${missing} not seen`);
  if (browser) {
    const page = browser.contexts()[0]?.pages()[0];
    const heard = await page?.evaluate<[string, number][]>('window.heard');
    const delays = [...sentAt].flatMap(([key, sent]) => {
      const first = heard?.find(([each]) => each === key);
      return first ? [first[1] - sent] : [];
    });
    console.log(`  of them one browser: ${spread(delays)}`);
    await browser.close();
  }
  console.log(
    `  server process with its threads: ${(await residentMegabytes(server.pid)).toFixed(0)} MB resident`,
  );
  await Promise.all(clients.map((client) => client.dispose()));
}

const cluster = await startThrowAway();
process.env['TEST_ADMIN_DATABASE_URL'] = cluster.url;
try {
  const database = await freshDatabase();
  const server = await startServer(database.adminUrl);
  try {
    const mover = await signIn(server.url, DEMO_OWNER.email, DEMO_PASSWORD);
    await measure(server, mover, 50, true);
    await measure(server, mover, 1_000, false);
  } finally {
    await server.stop();
    await database.drop();
  }
} finally {
  await cluster.end();
}
