import { event } from '#drizzle/tables/event';
import { HOUR_MS } from '#shared/time/instant';
import type { Services } from '#server/http/services';
import { DEMO_OTHERS, DEMO_OWNER, DEMO_PASSWORD } from './cast';
import { makeDemo } from './make';

/** A demo that nobody touched is moved to now when it is older than this. */
const STALE_MS = 12 * HOUR_MS;
/** One process makes the demo, the others find it made. */
const DEMO_LOCK = 7_301_105;

/**
 * Makes the demo shop once, moves it to now where nobody touched it, replaces it where that was asked for. Returns lines
 * for whoever started the server: how to sign in.
 */
export async function prepareDemo(services: Services): Promise<string[]> {
  const { doors, settings } = services;
  const now = services.now();
  const lock = await doors.work.connect();
  try {
    await lock.query('select pg_advisory_lock($1)', [DEMO_LOCK]);
    const [known] = await doors.entry<{ shop_id: string; made_at: Date; untouched: boolean }>(
      'select * from entry.demo_shop()',
    );
    const keep =
      known !== undefined &&
      !settings.demoFresh &&
      !(known.untouched && now.getTime() - known.made_at.getTime() > STALE_MS) &&
      (await isFinished(services, known.shop_id));
    if (known && !keep) await doors.entry('select entry.remove_demo($1)', [known.shop_id]);
    if (!keep) await makeDemo(services, now);
  } finally {
    await lock.query('select pg_advisory_unlock($1)', [DEMO_LOCK]).catch(() => undefined);
    lock.release();
  }
  const people = [DEMO_OWNER, ...DEMO_OTHERS];
  const widest = Math.max(...people.map((person) => person.email.length));
  return [
    'The demo shop is open. Sign in as:',
    ...people.map(
      ({ email, roles }) =>
        `  ${email.padEnd(widest)}  ${DEMO_PASSWORD}  (${roles.join(', ').toLowerCase()})`,
    ),
  ];
}

/** The shop and its people are made first, everything else with the events in one transaction after that. */
async function isFinished({ doors }: Services, shopId: string): Promise<boolean> {
  return doors.readShop(shopId, async (tx) => {
    const [any] = await tx.select({ seq: event.seq }).from(event).limit(1);
    return any !== undefined;
  });
}
