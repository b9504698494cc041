import { createHash } from 'node:crypto';
import { eq } from 'drizzle-orm';
import { batch, board, occupation, stepRun } from '#drizzle/tables/batch';
import { design } from '#drizzle/tables/design';
import { event } from '#drizzle/tables/event';
import { member } from '#drizzle/tables/member';
import { reading } from '#drizzle/tables/reading';
import { shopCounter } from '#drizzle/tables/shop';
import { DEFAULT_FINISHES, DEFAULT_GLUES } from '#shared/route/default-profiles';
import { DEFAULT_ROUTE } from '#shared/route/default-route';
import { resolveRoute, type FinishProfile, type GlueProfile } from '#shared/route/template';
import type { FloorShop } from '#shared/floor/model';
import { DEFAULT_CLAMPS, DEFAULT_SKILLS, DEFAULT_STATIONS } from '#shared/shop/defaults';
import { buildCalendar, isOpen } from '#shared/time/calendar';
import type { Hours } from '#shared/time/hours';
import { DAY_MS, HOUR_MS, MINUTE_MS } from '#shared/time/instant';
import { addDays, toLocal } from '#shared/time/zone';
import { copyRoute } from '#server/batches/copy-route';
import type { ShopTransaction } from '#server/db/doors';
import { newId } from '#server/db/uuid';
import { designRow } from '#server/designs/create-design';
import type { Services } from '#server/http/services';
import { hashPassword } from '#server/secrets/password';
import { newShopSettings } from '#server/session/sign-up';
import {
  DEMO_BATCHES,
  DEMO_DESIGNS,
  DEMO_OTHERS,
  DEMO_OWNER,
  DEMO_PASSWORD,
  type DemoPerson,
} from './cast';
import { makeOrders, type DemoLine } from './orders';
import { simulateDays, type SimulatedBatch, type SimulatedDays } from './simulate';

const DAYS_OF_HISTORY = 14;
/** The last hours count as worked whatever the clock says, so that holds run at any hour of the week. */
const ALWAYS_WORKED_MS = 9 * HOUR_MS;

const HOURS: Hours = {
  zone: 'Europe/Vienna',
  weekly: [
    ...Array.from({ length: 5 }, () => [
      { from: 450, to: 720 },
      { from: 765, to: 1020 },
    ]),
    [{ from: 480, to: 720 }],
    [],
  ],
  exceptions: [],
};

const NANOMETRES = 1_000_000n;

/** Makes the demo workshop: its people, designs, orders, and two weeks of work that ends now. */
export async function makeDemo(services: Services, now: Date): Promise<void> {
  const shopId = newId(now.getTime());
  const people = [DEMO_OWNER, ...DEMO_OTHERS].map((person) => ({
    ...person,
    memberId: newId(now.getTime()),
    personId: demoPersonId(person.email),
  }));
  const today = toLocal(HOURS.zone, now.getTime()).date;
  const designs = designRows(shopId);
  const steps = resolveRoute(
    DEFAULT_ROUTE,
    DEFAULT_GLUES[0] as GlueProfile,
    DEFAULT_FINISHES[0] as FinishProfile,
  );
  const planned = plannedBatches(designs, steps, now, today);
  // The days are lived before the database is touched: no transaction waits for them.
  const days = liveDays(people, planned, now);
  await makePeople(services, shopId, people, now);
  await services.doors.inShop(shopId, async (tx) => {
    await tx.insert(design).values(designs);
    const routeId = await copyRoute(tx, shopId, steps);
    await storeDays(tx, shopId, now, { planned, days, routeId, madeBy: people[0]?.memberId ?? '' });
    const lines = planned.map(({ batch: made, designId }): DemoLine => ({
      batchId: made.id,
      designId,
      boards: made.boards,
      dueDate: made.dueDate,
      shipBy: made.shipBy,
    }));
    await makeOrders(tx, shopId, now, today, lines, designs);
    await makeReadings(tx, shopId, now);
  });
  services.hub.wake();
}

/**
 * Always the same for an address (uuidv8, RFC 9562): people who were made by a start that was interrupted before they
 * became members belong to no shop that could be removed with them, and are found again.
 */
function demoPersonId(email: string): string {
  const bytes = createHash('sha256').update(`demo person ${email}`).digest().subarray(0, 16);
  bytes[6] = ((bytes[6] ?? 0) & 0x0f) | 0x80;
  bytes[8] = ((bytes[8] ?? 0) & 0x3f) | 0x80;
  const hex = bytes.toString('hex');
  return hex.replace(/^(.{8})(.{4})(.{4})(.{4})(.{12})$/, '$1-$2-$3-$4-$5');
}

type DemoDesignRow = ReturnType<typeof designRows>[number];
type PlannedBatch = SimulatedBatch & { designId: string };

function plannedBatches(
  designs: readonly DemoDesignRow[],
  steps: ReturnType<typeof resolveRoute>,
  now: Date,
  today: string,
): PlannedBatch[] {
  return DEMO_BATCHES.map((made, index): PlannedBatch => {
    const of = designs.find((candidate) => candidate.name === made.design);
    if (!of) throw new Error(`The demo has no design ${made.design}.`);
    const due = made.due === null ? null : addDays(today, made.due);
    return {
      designId: of.id,
      entersAt: made.entered === null ? null : now.getTime() - made.entered * DAY_MS,
      shipsWhenReady: index < 2,
      stopBefore: made.stopBefore ?? null,
      batch: {
        id: newId(now.getTime()),
        code: `CT-${String(index + 1).padStart(3, '0')}`,
        version: 1,
        boards: made.boards,
        needs: {
          panelCount: of.panelCount,
          panelBoards: of.panelBoards,
          blocksPerBoard: of.blocksPerBoard,
          panelClamps: { count: of.panelClampCount, length: of.panelClampLength },
          blockClamps: { count: of.blockClampCount, length: of.blockClampLength },
        },
        route: { id: '', steps },
        dueDate: due,
        shipBy: due === null ? null : addDays(due, -2),
        releasedAt: null,
        shippedAt: null,
        assignedTo: null,
        runs: [],
        occupations: [],
        overrides: [],
      },
    };
  });
}

function liveDays(
  people: readonly { memberId: string; roles: DemoPerson['roles']; skills: string[] }[],
  planned: readonly PlannedBatch[],
  now: Date,
): SimulatedDays {
  const shop: FloorShop = {
    zone: HOURS.zone,
    stations: DEFAULT_STATIONS,
    clamps: DEFAULT_CLAMPS,
  };
  const from = now.getTime() - DAYS_OF_HISTORY * DAY_MS;
  const calendar = buildCalendar(HOURS, from, now.getTime() + HOUR_MS);
  return simulateDays({
    shop,
    people: people.filter((person) => person.skills.length > 0),
    batches: planned,
    from,
    now: now.getTime(),
    isWorked: (at) => at > now.getTime() - ALWAYS_WORKED_MS || isOpen(calendar, at),
  });
}

async function makePeople(
  services: Services,
  shopId: string,
  cast: readonly (DemoPerson & { memberId: string; personId: string })[],
  now: Date,
): Promise<void> {
  const { doors } = services;
  const passwordHash = await hashPassword(DEMO_PASSWORD);
  const [owner, ...others] = cast;
  if (!owner) throw new Error('The demo has no owner.');
  const [made] = await doors.entry<{ made: boolean }>(
    'select entry.sign_up($1, $2, $3, $4, $5, $6, $7, $8) as made',
    [
      owner.personId,
      owner.email,
      passwordHash,
      JSON.stringify({
        id: shopId,
        name: 'Quayside Boards',
        zone: HOURS.zone,
        weekly: HOURS.weekly,
        skills: DEFAULT_SKILLS,
        route: DEFAULT_ROUTE,
        demo_made_at: now.toISOString(),
      }),
      JSON.stringify({
        id: owner.memberId,
        name: owner.name,
        initials: owner.initials,
        roles: owner.roles,
        skills: owner.skills,
      }),
      ...newShopSettings(),
    ],
  );
  if (!made?.made) throw new Error(`The demo's address ${owner.email} is taken.`);
  for (const person of others) {
    await doors.entry('select entry.add_person($1, $2, $3)', [
      person.personId,
      person.email,
      passwordHash,
    ]);
  }
  await doors.inShop(shopId, (tx) =>
    tx.insert(member).values(
      others.map((person) => ({
        shopId,
        id: person.memberId,
        personId: person.personId,
        name: person.name,
        initials: person.initials,
        roles: person.roles,
        skills: person.skills,
      })),
    ),
  );
}

function designRows(shopId: string) {
  return DEMO_DESIGNS.map((each) => ({
    shopId,
    id: newId(),
    ...designRow({
      name: each.name,
      length: BigInt(each.size.length) * NANOMETRES,
      width: BigInt(each.size.width) * NANOMETRES,
      thickness: BigInt(each.size.thickness) * NANOMETRES,
      strips: each.strips.map(([species, width]) => ({
        species,
        width: BigInt(width) * NANOMETRES,
      })),
      slices: each.slices,
      panelCount: 1,
      panelBoards: each.panelBoards,
      blocksPerBoard: 1,
      panelClampCount: each.panelClampCount,
      blockClampCount: each.blockClampCount,
    }),
  }));
}

/** Writes what the simulated days left: rows as they are now, and the events that led there. */
async function storeDays(
  tx: ShopTransaction,
  shopId: string,
  now: Date,
  lived: {
    planned: readonly PlannedBatch[];
    days: SimulatedDays;
    routeId: string;
    madeBy: string;
  },
): Promise<void> {
  const { planned, days, routeId, madeBy } = lived;
  const designOf = new Map(planned.map((each) => [each.batch.id, each.designId]));
  const madeAt = new Map(
    planned.map((each) => [
      each.batch.id,
      (each.entersAt ?? now.getTime() - 6 * HOUR_MS) - 30 * MINUTE_MS,
    ]),
  );
  const atOrNull = (at: number | null) => (at === null ? null : new Date(at));
  await tx.insert(batch).values(
    days.batches.map((made) => ({
      shopId,
      id: made.id,
      version: made.version,
      code: made.code,
      designId: designOf.get(made.id) ?? '',
      routeId,
      boards: made.boards,
      dueDate: made.dueDate,
      shipBy: made.shipBy,
      releasedAt: atOrNull(made.releasedAt),
      shippedAt: atOrNull(made.shippedAt),
      createdAt: new Date(madeAt.get(made.id) ?? now),
    })),
  );
  const runs = days.batches.flatMap((made) =>
    made.runs.map((run) => ({
      shopId,
      batchId: made.id,
      step: run.step,
      piece: run.piece,
      startedAt: atOrNull(run.startedAt),
      startedBy: run.startedBy,
      finishedAt: atOrNull(run.finishedAt),
      finishedBy: run.finishedBy,
      cutAt: atOrNull(run.cutAt),
      cutBy: run.cutBy,
    })),
  );
  await insertMany(runs, (rows) => tx.insert(stepRun).values(rows));
  const held = days.batches.flatMap((made) =>
    made.occupations.map((each) => ({
      shopId,
      batchId: made.id,
      resource: each.resource,
      isClamps: each.isClamps,
      amount: each.amount,
      step: each.step,
      piece: each.piece,
      since: new Date(each.since),
      until: atOrNull(each.until),
    })),
  );
  await insertMany(held, (rows) => tx.insert(occupation).values(rows));
  let serial = 0;
  const boards = days.batches.flatMap((made) =>
    Array.from({ length: made.boards }, () => ({
      shopId,
      id: newId(),
      batchId: made.id,
      serial: ++serial,
    })),
  );
  await insertMany(boards, (rows) => tx.insert(board).values(rows));
  const events = [
    ...days.batches.map((made) => ({
      type: 'BATCH_MADE',
      by: madeBy,
      at: madeAt.get(made.id) ?? now.getTime(),
      batchId: made.id,
      data: { version: 1, designId: designOf.get(made.id), boards: made.boards, lineIds: [] },
    })),
    ...days.events.map((each) => ({
      type: each.type,
      by: each.by,
      at: each.at,
      batchId: each.batchId,
      data: {
        version: each.version,
        changes: each.changes,
        ...(each.to !== null && { to: each.to }),
      },
    })),
  ].sort((a, b) => a.at - b.at);
  await insertMany(
    events.map((each, index) => ({
      shopId,
      seq: index + 1,
      type: each.type,
      by: each.by,
      happenedAt: new Date(each.at),
      recordedAt: new Date(each.at),
      batchId: each.batchId,
      data: each.data,
    })),
    (rows) => tx.insert(event).values(rows),
  );
  await tx
    .update(shopCounter)
    .set({ seq: events.length, batchCode: days.batches.length, boardSerial: serial })
    .where(eq(shopCounter.shopId, shopId));
}

/** Two weeks of readings, morning and afternoon: cool nights, warmer days, deterministic. */
async function makeReadings(tx: ShopTransaction, shopId: string, now: Date): Promise<void> {
  const rows = Array.from({ length: DAYS_OF_HISTORY * 2 + 1 }, (_, half) => {
    const at = new Date(now.getTime() - 20 * MINUTE_MS - half * 12 * HOUR_MS);
    const swing = Math.round(12 * Math.sin(half * 1.7));
    return {
      shopId,
      id: newId(at.getTime()),
      at,
      temperatureTenthsC: 186 + swing,
      humidityPercent: 46 + Math.round(4 * Math.sin(half * 0.9)),
    };
  });
  await tx.insert(reading).values(rows);
}

async function insertMany<Row>(
  rows: readonly Row[],
  insert: (rows: Row[]) => PromiseLike<unknown>,
): Promise<void> {
  // PostgreSQL takes 65,535 parameters in one statement.
  const size = 1_000;
  for (let start = 0; start < rows.length; start += size) {
    await insert(rows.slice(start, start + size));
  }
}
