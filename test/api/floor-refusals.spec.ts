import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { localId } from '#server/http/global-id';
import { startApiServer, type ApiServer } from '../factories/api-server';
import { TestClock } from '../factories/clock';
import {
  assign,
  done,
  finish,
  makeBatch,
  move,
  readBatch,
  start,
  undo,
  type BatchAnswer,
  type CommandAnswer,
} from '../factories/commands';
import { newMember, newOwner, type Person } from '../factories/people';
import { newDesign } from '../factories/things';
import { fingerprint } from '../factories/walls';

/* Every refusal has a code and a sentence, and leaves every row as it was. */

const clock = new TestClock(Date.parse('2026-12-01T08:00:00Z'));
let server: ApiServer;
let owner: Person;
let maker: Person;
let helper: Person;
let neighbour: Person;
/** Queued; in clamps; being ripped; milled, so that it wants the saw; out of the shop. */
let queued: BatchAnswer;
let clamped: BatchAnswer;
let ripping: BatchAnswer;
let milled: BatchAnswer;
let shipped: BatchAnswer;
/** Commands by the maker: the start of the ripping, and one on the batch in clamps on which a finish was built. */
let lastEvent: number | null;
let builtOn: number | null;

beforeAll(async () => {
  server = await startApiServer({}, { now: clock.now });
  owner = await newOwner(server);
  maker = await newMember(server, owner, ['MAKER']);
  helper = await newMember(server, owner, ['HELPER']);
  neighbour = await newOwner(server);
  const designId = await newDesign(owner.caller, { panelBoards: 2 });
  const { caller } = maker;
  const make = () => done(makeBatch(owner.caller, { designId, boards: 4 }));
  const mill = async (batch: BatchAnswer) => {
    const started = await done(start(caller, batch, 'mill', [0]));
    return done(finish(caller, started, 'mill', [0]));
  };
  shipped = await make();
  await server.admin.query('update batch set released_at = $1, shipped_at = $1', [clock.now()]);
  milled = await mill(await make());
  ripping = await mill(await make());
  ripping = await done(start(caller, ripping, 'rip', [0]));
  lastEvent = ripping.undo?.event ?? null;
  clamped = await done(move(caller, await make(), 'FIRST_GLUE_UP'));
  clamped = await done(start(caller, clamped, 'glue-1', [1, 2]));
  builtOn = clamped.undo?.event ?? null;
  clamped = await done(finish(caller, clamped, 'glue-1', [1]));
  queued = await make();
});
afterAll(() => server.stop());

const why = { override: { reason: 'it looks dry to me', cautionRead: true } };

const refusals: [string, string, RegExp, () => Promise<CommandAnswer>][] = [
  [
    'a step that the route lacks',
    'STEP_UNKNOWN',
    /./,
    () => start(maker.caller, queued, 'paint', [0]),
  ],
  ['a wait', 'STEP_UNKNOWN', /./, () => start(maker.caller, clamped, 'cure-1', [1])],
  [
    'a piece that is not there',
    'PIECE_UNKNOWN',
    /panel|2/,
    () => start(maker.caller, clamped, 'glue-1', [3]),
  ],
  ['no piece', 'PIECES_EMPTY', /./, () => start(maker.caller, queued, 'mill', [])],
  [
    'a step before its time',
    'STEP_BEFORE',
    /milling/,
    () => start(maker.caller, queued, 'rip', [0]),
  ],
  ['a second start', 'ALREADY_STARTED', /ripping/, () => start(helper.caller, ripping, 'rip', [0])],
  [
    'a start of what is finished',
    'ALREADY_FINISHED',
    /milling/,
    () => start(helper.caller, ripping, 'mill', [0]),
  ],
  [
    'a finish of what nobody started',
    'NOT_STARTED',
    /milling/,
    () => finish(helper.caller, queued, 'mill', [0]),
  ],
  [
    'a second finish',
    'ALREADY_FINISHED',
    /milling/,
    () => finish(helper.caller, ripping, 'mill', [0]),
  ],
  [
    'one started piece among others',
    'ALREADY_FINISHED',
    /./,
    () => finish(helper.caller, clamped, 'glue-1', [1, 2]),
  ],
  [
    'a station that is full',
    'STATION_FULL',
    /table saw/,
    () => start(maker.caller, milled, 'rip', [0]),
  ],
  [
    'work on a piece in clamps',
    'HOLD_RUNNING',
    /clamps/,
    () => start(maker.caller, clamped, 'unclamp-1', [1]),
  ],
  [
    'a helper who overrides',
    'FORBIDDEN',
    /./,
    () => start(helper.caller, clamped, 'unclamp-1', [1], why),
  ],
  [
    'an override without a reason',
    'REASON_MISSING',
    /^Write why/,
    () =>
      start(maker.caller, clamped, 'unclamp-1', [1], {
        override: { reason: ' x ', cautionRead: true },
      }),
  ],
  [
    'an override of 10,000 characters',
    'REASON_MISSING',
    /^Write why/,
    () =>
      start(maker.caller, clamped, 'unclamp-1', [1], {
        override: { reason: 'x'.repeat(10_000), cautionRead: true },
      }),
  ],
  [
    'an override before the caution',
    'CAUTION_FIRST',
    /./,
    () =>
      start(maker.caller, clamped, 'unclamp-1', [1], {
        override: { reason: why.override.reason, cautionRead: false },
      }),
  ],
  [
    'an override of nothing',
    'NOTHING_TO_OVERRIDE',
    /./,
    () => start(maker.caller, queued, 'mill', [0], why),
  ],
  [
    'a time to come',
    'IN_THE_FUTURE',
    /./,
    () => start(maker.caller, queued, 'mill', [0], { happenedAt: clock.ago(-10) }),
  ],
  [
    'a helper who logs three hours late',
    'TOO_LONG_AGO',
    /./,
    () => start(helper.caller, queued, 'mill', [0], { happenedAt: clock.ago(180) }),
  ],
  [
    'a maker who logs last summer',
    'TOO_LONG_AGO',
    /./,
    () => start(maker.caller, queued, 'mill', [0], { happenedAt: clock.ago(60 * 24 * 120) }),
  ],
  [
    'a finish before its start',
    'BEFORE_THE_FACT_BEFORE',
    /./,
    () => finish(maker.caller, ripping, 'rip', [0], { happenedAt: clock.ago(30) }),
  ],
  [
    'a move to where it is',
    'ALREADY_THERE',
    /./,
    () => move(maker.caller, clamped, 'FIRST_GLUE_UP'),
  ],
  [
    'a move past a wait that would only begin',
    'HOLD_AHEAD',
    /./,
    () => move(maker.caller, queued, 'SLICE'),
  ],
  [
    'a move past a wait that would only begin, overriding',
    'HOLD_AHEAD',
    /./,
    () => move(maker.caller, queued, 'SURFACE', why),
  ],
  [
    'a move back without a reason',
    'REASON_MISSING',
    /^Write why/,
    () => move(maker.caller, ripping, 'QUEUED'),
  ],
  [
    'a move of what has left the shop',
    'SHIPPED_STAYS',
    /./,
    () => move(maker.caller, shipped, 'SAND', { reason: 'a scratch' }),
  ],
  [
    'a start on what has left the shop',
    'BATCH_GONE',
    /./,
    () => start(maker.caller, shipped, 'mill', [0]),
  ],
  ['a batch of another shop', 'NOT_FOUND', /./, () => move(neighbour.caller, queued, 'BLANK')],
  [
    'a batch that is none',
    'NOT_FOUND',
    /./,
    () => move(maker.caller, { id: owner.memberId, version: 1 }, 'BLANK'),
  ],
  [
    'an undo of what was built on',
    'UNDO_BUILT_ON',
    /./,
    () => undo(maker.caller, clamped, builtOn),
  ],
  [
    'an undo of a command on another batch',
    'UNDO_BUILT_ON',
    /./,
    () => undo(maker.caller, queued, lastEvent),
  ],
  ['an undo of the making', 'UNDO_BUILT_ON', /./, () => undo(maker.caller, queued, 1)],
  ['a helper who undoes a maker', 'FORBIDDEN', /./, () => undo(helper.caller, ripping, lastEvent)],
  [
    'a person of another shop',
    'NOT_FOUND',
    /./,
    () => assign(maker.caller, queued, neighbour.memberId),
  ],
  ['a person who is none', 'NOT_FOUND', /./, () => assign(maker.caller, queued, 'Ruth')],
];

/** All rows of the shop. */
const shopRows = () => fingerprint(server.admin, localId('shop', owner.shopId) ?? '');

describe('refused, and nothing is written:', () => {
  it.each(refusals)('%s', async (_, code, sentence, give) => {
    const before = await shopRows();
    const { problems, event } = await give();
    expect(problems).toHaveLength(1);
    expect(problems[0]?.code).toBe(code);
    expect(problems[0]?.sentence).toMatch(sentence);
    expect(problems[0]?.sentence).toMatch(/^[^a-z].{10,}[.!]$/);
    expect(event).toBeNull();
    expect(await shopRows()).toBe(before);
  });

  it('an old version, with the name of who was first', async () => {
    const stale = queued;
    const given = await done(assign(helper.caller, queued, helper.memberId));
    const before = await shopRows();
    for (const late of [
      () => start(maker.caller, stale, 'mill', [0]),
      () => move(maker.caller, stale, 'BLANK'),
      () => assign(maker.caller, stale, null),
      () => finish(maker.caller, { ...stale, version: 99 }, 'mill', [0]),
    ]) {
      const { problems, batch, event } = await late();
      expect(problems).toMatchObject([{ code: 'VERSION_CONFLICT', field: 'version' }]);
      expect(problems[0]?.sentence).toMatch(/^Member HELPER changed /);
      expect(batch).toMatchObject({ version: given.version, assignedTo: helper.memberId });
      expect(event).toBeNull();
    }
    expect(await shopRows()).toBe(before);
    queued = await readBatch(owner.caller, queued.code);
  });

  it('an undo after ten minutes', async () => {
    const before = await shopRows();
    clock.pass(11);
    const { problems } = await undo(maker.caller, ripping, lastEvent);
    expect(problems).toMatchObject([{ code: 'UNDO_TOO_LATE' }]);
    expect(await shopRows()).toBe(before);
    expect((await readBatch(owner.caller, ripping.code)).undo).toBeNull();
  });
});
