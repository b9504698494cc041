import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { localId } from '#server/http/global-id';
import { startApiServer, type ApiServer } from '../factories/api-server';
import { TestClock } from '../factories/clock';
import {
  assign,
  done,
  finish,
  history,
  makeBatch,
  move,
  readBatch,
  start,
  undo,
  type BatchAnswer,
} from '../factories/commands';
import { floorRows } from '../factories/floor-rows';
import { newMember, newOwner, type Person } from '../factories/people';
import { newDesign } from '../factories/things';

/* What commands on the Floor write, with a clock that the test moves. */

const clock = new TestClock(Date.parse('2026-12-01T08:00:00Z'));
let server: ApiServer;
let owner: Person;
let maker: Person;
let helper: Person;
let designId: string;
let batch: BatchAnswer;

beforeAll(async () => {
  server = await startApiServer({}, { now: clock.now });
  owner = await newOwner(server);
  maker = await newMember(server, owner, ['MAKER']);
  helper = await newMember(server, owner, ['HELPER']);
  // Four boards from two panels, so that pieces of one batch can differ.
  designId = await newDesign(owner.caller, { panelBoards: 2 });
});
afterAll(() => server.stop());

beforeEach(async () => {
  // Whatever the test before left on the floor is off it, and nothing is occupied.
  await server.admin.query('update occupation set until = since where until is null');
  clock.pass(60 * 24);
  batch = await done(makeBatch(owner.caller, { designId, boards: 4 }));
});

const rows = () => floorRows(server.admin, batch);
const idOf = (person: Person) => localId('member', person.memberId);

/** The batch with its panels' glue-up finished a moment ago. */
async function glued(caller = maker.caller): Promise<BatchAnswer> {
  let at = await done(move(caller, batch, 'FIRST_GLUE_UP'));
  at = await done(start(caller, at, 'glue-1', [1, 2]));
  return done(finish(caller, at, 'glue-1', [1, 2]));
}

describe('a start and a finish', () => {
  it('write the run, the station, the version and a fact with its person', async () => {
    const started = await done(start(helper.caller, batch, 'mill', [0]));
    expect(started).toMatchObject({ version: 2, place: 'BLANK' });
    let held = await rows();
    expect(held.runs).toMatchObject([
      {
        step: 'mill',
        piece: 0,
        started_at: clock.now(),
        started_by: idOf(helper),
        finished_at: null,
      },
    ]);
    expect(held.occupations).toMatchObject([
      { resource: 'planer', is_clamps: false, amount: 1, since: clock.now(), until: null },
    ]);
    expect(held.batch).toMatchObject({ version: 2, released_at: clock.now() });
    expect(held.events.at(-1)).toMatchObject({
      type: 'STEP_STARTED',
      by: idOf(helper),
      happened_at: clock.now(),
      recorded_at: clock.now(),
      data: { version: 2 },
    });
    clock.pass(30);
    const finished = await finish(maker.caller, started, 'mill', [0]);
    expect(finished.batch).toMatchObject({ version: 3, occupations: [] });
    held = await rows();
    expect(held.runs).toMatchObject([
      { started_by: idOf(helper), finished_at: clock.now(), finished_by: idOf(maker) },
    ]);
    expect(held.occupations).toMatchObject([{ resource: 'planer', until: clock.now() }]);
    expect(held.events.at(-1)).toMatchObject({ seq: finished.event, type: 'STEP_FINISHED' });
    expect((await history(owner.caller, batch)).map((each) => each.sentence)).toEqual([
      'Member MAKER finished milling.',
      'Member HELPER started milling.',
      'Ruth Amsel made the batch of 4 boards.',
    ]);
  });

  it('keep clamps occupied until someone has taken them off, through the night', async () => {
    const curing = await glued();
    const clamps = () =>
      server.admin.query(
        'select sum(amount)::int as used from occupation where is_clamps and until is null',
      );
    expect((await clamps()).rows).toEqual([{ used: 8 }]);
    clock.pass(60 * 20);
    expect((await clamps()).rows).toEqual([{ used: 8 }]);
    const other = await done(makeBatch(owner.caller, { designId, boards: 8 }));
    const ahead = await done(move(maker.caller, other, 'FIRST_GLUE_UP'));
    // Eighteen clamps there are: two panels take eight, and three more would take twelve.
    await server.admin.query(`update station set capacity = 9 where key = 'glue-bench'`);
    const refused = await start(maker.caller, ahead, 'glue-1', [1, 2, 3]);
    expect(refused.problems).toMatchObject([{ code: 'CLAMPS_FULL' }]);
    expect(refused.problems[0]?.sentence).toContain(batch.code);
    let off = await done(start(helper.caller, curing, 'unclamp-1', [1, 2]));
    expect((await clamps()).rows).toEqual([{ used: 8 }]);
    clock.pass(10);
    off = await done(finish(helper.caller, off, 'unclamp-1', [1]));
    expect((await clamps()).rows).toEqual([{ used: 4 }]);
    await done(finish(helper.caller, off, 'unclamp-1', [2]));
    await done(start(maker.caller, ahead, 'glue-1', [1, 2, 3]));
    await server.admin.query(`update station set capacity = 2 where key = 'glue-bench'`);
    expect((await clamps()).rows).toEqual([{ used: 12 }]);
  });

  it('count from when they happened, as far back as a person may say', async () => {
    const milled = await done(
      start(helper.caller, batch, 'mill', [0], { happenedAt: clock.ago(40) }),
    );
    await done(finish(helper.caller, milled, 'mill', [0], { happenedAt: clock.ago(10) }));
    const { runs, occupations, events } = await rows();
    expect(runs).toMatchObject([
      { started_at: new Date(clock.ago(40)), finished_at: new Date(clock.ago(10)) },
    ]);
    expect(occupations).toMatchObject([
      { since: new Date(clock.ago(40)), until: new Date(clock.ago(10)) },
    ]);
    expect(events.at(-1)).toMatchObject({
      happened_at: new Date(clock.ago(10)),
      recorded_at: clock.now(),
    });
    const [fact] = await history(owner.caller, batch);
    expect(fact).toMatchObject({
      happenedAt: clock.ago(10),
      recordedAt: clock.now().toISOString(),
    });
  });

  it('lets a maker log yesterday, with holds that have cleared since', async () => {
    const at = (minutes: number) => ({ happenedAt: clock.ago(minutes) });
    let late = await done(makeBatch(owner.caller, { designId, boards: 2 }));
    late = await done(move(maker.caller, late, 'FIRST_GLUE_UP', at(900)));
    late = await done(start(maker.caller, late, 'glue-1', [1], at(880)));
    late = await done(finish(maker.caller, late, 'glue-1', [1], at(850)));
    late = await done(start(maker.caller, late, 'unclamp-1', [1], at(60)));
    late = await done(finish(maker.caller, late, 'unclamp-1', [1], at(55)));
    expect(late.place).toBe('SLICE');
    late = await done(start(helper.caller, late, 'flatten-1', [1]));
    expect(late.overrides).toEqual([]);
  });
});

describe('a move', () => {
  it('finishes the steps in between, as one fact', async () => {
    const moved = await move(maker.caller, batch, 'FIRST_GLUE_UP');
    expect(moved.batch).toMatchObject({ version: 2, place: 'FIRST_GLUE_UP' });
    const { runs, events } = await rows();
    expect(runs.map((run) => [run.step, run.finished_by])).toEqual([
      ['mill', idOf(maker)],
      ['rip', idOf(maker)],
    ]);
    expect(events.map((event) => event.type)).toEqual(['BATCH_MADE', 'BATCH_MOVED']);
    expect(events.at(-1)).toMatchObject({ seq: moved.event, data: { to: 'FIRST_GLUE_UP' } });
  });

  it('back is rework: with a reason that the history tells and no event holds', async () => {
    const ahead = await done(move(maker.caller, batch, 'FIRST_GLUE_UP'));
    const back = await done(
      move(maker.caller, ahead, 'BLANK', { reason: '  Planer burn on one face ' }),
    );
    expect(back).toMatchObject({ version: 3, place: 'BLANK', runs: [] });
    const { events, runs } = await rows();
    expect(runs).toEqual([]);
    expect(events.at(-1)).toMatchObject({ type: 'BATCH_REWORKED', data: { version: 3 } });
    expect(JSON.stringify(events)).not.toContain('burn');
    const { rows: reasons } = await server.admin.query(
      'select reason from rework_reason where batch_id = $1',
      [localId('batch', batch.id)],
    );
    expect(reasons).toEqual([{ reason: 'Planer burn on one face' }]);
    expect((await history(owner.caller, batch))[0]?.sentence).toBe(
      'Member MAKER sent it back to Blank: “Planer burn on one face”.',
    );
  });
});

describe('an override', () => {
  const because = { override: { reason: 'The saw is free now', cautionRead: true } };

  it('stays on the batch for ever, and the owner hears of it until it is seen', async () => {
    const curing = await glued();
    const started = await done(start(maker.caller, curing, 'unclamp-1', [1], because));
    expect(started.overrides).toMatchObject([
      { step: 'clamped-1', piece: 1, reason: 'The saw is free now', seen: false },
    ]);
    const held = await rows();
    expect(held.overrides).toMatchObject([
      { step: 'clamped-1', piece: 1, by: idOf(maker), at: clock.now(), seen_at: null },
    ]);
    expect(held.runs.find((run) => run.step === 'clamped-1')).toMatchObject({
      piece: 1,
      cut_at: clock.now(),
      cut_by: idOf(maker),
    });
    const { data } = held.events.at(-1) ?? {};
    expect(data).toMatchObject({ overrideIds: [held.overrides[0]?.id] });
    expect(JSON.stringify(held.events)).not.toContain('saw is free');
    expect((await history(owner.caller, batch))[0]?.sentence).toBe(
      'Member MAKER started taking clamps off on panel 1, overriding a hold.',
    );

    const unseen = async () =>
      (
        await owner.caller.get<{
          unseenOverrides: { batchCode: string; override: { id: string }; sentence: string }[];
        }>('{ unseenOverrides { batchCode sentence override { id } } }')
      ).unseenOverrides.filter((each) => each.batchCode === batch.code);
    const [told] = await unseen();
    expect(told?.sentence).toContain(batch.code);
    expect(told?.sentence).toContain('The saw is free now');
    const see = () =>
      owner.caller.get('mutation ($id: ID!) { seeOverride(id: $id) }', { id: told?.override.id });
    expect(await see()).toEqual({ seeOverride: true });
    expect(await see()).toEqual({ seeOverride: false });
    expect(await unseen()).toEqual([]);
    expect((await readBatch(owner.caller, batch.code)).overrides).toMatchObject([{ seen: true }]);
    // Taken back, the hold runs again; what was written down stays.
    const undone = await done(undo(maker.caller, started, started.undo?.event ?? null));
    expect(undone.runs.filter((run) => run.cutAt !== null)).toEqual([]);
    expect((await rows()).overrides).toHaveLength(1);
    const again = await start(maker.caller, undone, 'unclamp-1', [1]);
    expect(again.problems).toMatchObject([{ code: 'HOLD_RUNNING' }]);
  });

  it('of a hold on the way back is told as the reason of the rework too', async () => {
    const curing = await glued();
    const refused = await move(maker.caller, curing, 'BLANK', { reason: 'wrong strips' });
    expect(refused.problems).toMatchObject([{ code: 'HOLD_RUNNING' }]);
    const back = await done(move(maker.caller, curing, 'BLANK', because));
    expect(back.place).toBe('BLANK');
    expect(back.overrides.map((each) => [each.step, each.piece, each.reason])).toEqual(
      expect.arrayContaining([
        ['clamped-1', 1, 'The saw is free now'],
        ['clamped-1', 2, 'The saw is free now'],
      ]),
    );
    expect((await history(owner.caller, batch))[0]?.sentence).toBe(
      'Member MAKER sent it back to Blank, overriding 4 holds: “The saw is free now”.',
    );
  });

  it('is written once for each hold that it cuts', async () => {
    const curing = await glued();
    const refused = await start(maker.caller, curing, 'unclamp-1', [1, 2]);
    expect(refused.problems).toMatchObject([{ code: 'HOLD_RUNNING' }]);
    await done(start(maker.caller, curing, 'unclamp-1', [1, 2], because));
    expect((await rows()).overrides.map((each) => [each.step, each.piece])).toEqual([
      ['clamped-1', 1],
      ['clamped-1', 2],
    ]);
  });
});

describe('an undo', () => {
  it('puts rows back as they were, and is a fact of its own', async () => {
    const before = await rows();
    const started = await done(start(helper.caller, batch, 'mill', [0]));
    expect(started.undo).toMatchObject({ by: helper.memberId });
    const undone = await undo(helper.caller, started, started.undo?.event ?? null);
    expect(undone.batch).toMatchObject({ version: 3, place: 'QUEUED', runs: [], undo: null });
    const after = await rows();
    expect(after.runs).toEqual(before.runs);
    expect(after.batch).toMatchObject({ released_at: null });
    // The station was taken for no time at all.
    expect(after.occupations).toMatchObject([{ since: clock.now(), until: clock.now() }]);
    expect(after.events.at(-1)).toMatchObject({
      type: 'COMMAND_UNDONE',
      data: { undoes: started.undo?.event, version: 3 },
    });
    const twice = await undo(helper.caller, started, undone.event);
    expect(twice.problems).toMatchObject([{ code: 'UNDO_BUILT_ON' }]);
  });

  it('is refused when another batch had meanwhile what the command gave back', async () => {
    const milling = await done(start(helper.caller, batch, 'mill', [0]));
    clock.pass(30);
    const milled = await done(finish(helper.caller, milling, 'mill', [0]));
    let other = await done(makeBatch(owner.caller, { designId, boards: 4 }));
    clock.pass(1);
    other = await done(start(maker.caller, other, 'mill', [0]));
    clock.pass(2);
    await done(finish(maker.caller, other, 'mill', [0]));
    clock.pass(1);
    // The planer is free again, but both would have been on it a minute ago.
    const undone = await undo(helper.caller, milled, milled.undo?.event ?? null);
    expect(undone.problems).toMatchObject([{ code: 'UNDO_BUILT_ON' }]);
  });

  it('takes back what somebody else did only for makers', async () => {
    const moved = await done(move(maker.caller, batch, 'BLANK'));
    const event = moved.undo?.event ?? null;
    const byHelper = await undo(helper.caller, moved, event);
    expect(byHelper.problems).toMatchObject([{ code: 'FORBIDDEN' }]);
    await done(undo(owner.caller, moved, event));
  });
});

describe('a batch is given', () => {
  it('to a person of the shop, to no one, and to nobody else', async () => {
    const given = await done(assign(helper.caller, batch, maker.memberId));
    expect(given).toMatchObject({ version: 2, assignedTo: maker.memberId });
    expect((await rows()).batch).toMatchObject({ assigned_to: idOf(maker) });
    const { assignedTo } = await done(assign(maker.caller, given, null));
    expect(assignedTo).toBeNull();
    expect((await rows()).events.map((event) => event.type)).toEqual([
      'BATCH_MADE',
      'BATCH_ASSIGNED',
      'BATCH_ASSIGNED',
    ]);
  });
});
