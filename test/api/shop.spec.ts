import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { localId } from '#server/http/global-id';
import { startApiServer, type ApiServer } from '../factories/api-server';
import { newOwner, type Person } from '../factories/people';
import { newBatch, newDesign, tryDesign, tryMove } from '../factories/things';

let server: ApiServer;
let owner: Person;
beforeAll(async () => {
  server = await startApiServer();
});
afterAll(() => server.stop());

interface Shop {
  version: number;
  weekly: { fromMinute: number; toMinute: number }[][];
  exceptions: { date: string; reason: string | null; spans: unknown[] }[];
  clamps: { key: string; length: string; count: number }[];
}
interface Payload {
  shop: Shop;
  problems: { code: string; field: string | null; sentence: string }[];
}

const SHOP = `version weekly { fromMinute toMinute } exceptions { date reason spans { fromMinute toMinute } }
  clamps { key length count }`;

const readShop = () => owner.caller.get<{ shop: Shop }>(`{ shop { ${SHOP} } }`).then((d) => d.shop);

function setHours(version: number, weekly: unknown, exceptions: unknown = []) {
  return owner.caller
    .get<{ setHours: Payload }>(
      `mutation ($version: Int!, $weekly: [[HourSpanInput!]!]!, $exceptions: [HoursExceptionInput!]!) {
        setHours(version: $version, weekly: $weekly, exceptions: $exceptions) {
          shop { ${SHOP} } problems { code field sentence }
        }
      }`,
      { version, weekly, exceptions },
    )
    .then((d) => d.setHours);
}

function setClamps(version: number, clamps: unknown) {
  return owner.caller
    .get<{ setClamps: Payload }>(
      `mutation ($version: Int!, $clamps: [ClampClassInput!]!) {
        setClamps(version: $version, clamps: $clamps) { shop { ${SHOP} } problems { code field sentence } }
      }`,
      { version, clamps },
    )
    .then((d) => d.setClamps);
}

const EVERY_DAY = Array.from({ length: 7 }, () => [{ fromMinute: 0, toMinute: 1440 }]);
const refusals = ({ problems }: Payload) => problems.map(({ code, field }) => [code, field]);

describe('setting hours', () => {
  beforeAll(async () => {
    owner = await newOwner(server);
  });

  it('takes weekly hours and exceptions, raises the version and tells it as an event', async () => {
    const { version } = await readShop();
    const weekly = [[{ fromMinute: 420, toMinute: 720 }], [], [], [], [], [], []];
    const exceptions = [
      { date: '2027-01-06', spans: [], reason: ' holiday ' },
      { date: '2026-12-24', spans: [{ fromMinute: 480, toMinute: 720 }], reason: null },
    ];
    const { shop, problems } = await setHours(version, weekly, exceptions);
    expect(problems).toEqual([]);
    expect(shop).toMatchObject({
      version: version + 1,
      weekly,
      exceptions: [
        { date: '2026-12-24', reason: null, spans: [{ fromMinute: 480, toMinute: 720 }] },
        { date: '2027-01-06', reason: 'holiday', spans: [] },
      ],
    });
    const { rows } = await server.admin.query<{ data: unknown }>(
      `select data from event where shop_id = $1 and type = 'SHOP_CHANGED' order by seq desc limit 1`,
      [localId('shop', owner.shopId)],
    );
    expect(rows[0]?.data).toEqual({ version: version + 1, part: 'HOURS' });
  });

  it('gives one winner to two who saw the same version, and shows the other what stands', async () => {
    const { version } = await readShop();
    const answers = await Promise.all([setHours(version, EVERY_DAY), setHours(version, EVERY_DAY)]);
    expect(answers.map((answer) => answer.problems[0]?.code ?? 'DONE').sort()).toEqual([
      'DONE',
      'VERSION_CONFLICT',
    ]);
    for (const { shop } of answers) expect(shop.version).toBe(version + 1);
  });

  it.each<[string, unknown, unknown, string[]]>([
    ['six days', EVERY_DAY.slice(1), [], ['weekly']],
    [
      'an end before its start',
      [[{ fromMinute: 60, toMinute: 30 }], [], [], [], [], [], []],
      [],
      ['weekly.0.0'],
    ],
    [
      'a minute after midnight',
      [[{ fromMinute: 0, toMinute: 1441 }], [], [], [], [], [], []],
      [],
      ['weekly.0.0.toMinute'],
    ],
    [
      'an absurd minute',
      [[{ fromMinute: -2147483648, toMinute: 60 }], [], [], [], [], [], []],
      [],
      ['weekly.0.0.fromMinute'],
    ],
    [
      'spans over one another',
      [
        [
          { fromMinute: 0, toMinute: 60 },
          { fromMinute: 30, toMinute: 90 },
        ],
        [],
        [],
        [],
        [],
        [],
        [],
      ],
      [],
      ['weekly.0'],
    ],
    [
      'a date twice',
      EVERY_DAY,
      [
        { date: '2026-12-24', spans: [] },
        { date: '2026-12-24', spans: [] },
      ],
      ['exceptions'],
    ],
    [
      'a reason of 10,000 characters',
      EVERY_DAY,
      [{ date: '2026-12-24', spans: [], reason: 'x'.repeat(10_000) }],
      ['exceptions.0.reason'],
    ],
  ])('refuses %s and changes nothing', async (_, weekly, exceptions, fields) => {
    const before = await readShop();
    const answer = await setHours(before.version, weekly, exceptions);
    expect(answer.problems.map((problem) => problem.field)).toEqual(fields);
    expect(answer.shop).toEqual(before);
  });

  it('refuses a date that the calendar lacks as bad input', async () => {
    const { codes } = await owner.caller.ask(
      'mutation { setHours(version: 1, weekly: [], exceptions: [{date: "2026-02-30", spans: []}]) { problems { code } } }',
    );
    expect(codes[0]).toMatch(/GRAPHQL_VALIDATION_FAILED|BAD_USER_INPUT/);
  });
});

describe('setting clamps', () => {
  beforeAll(async () => {
    owner = await newOwner(server);
  });

  it('changes, adds and removes classes', async () => {
    const { version } = await readShop();
    const { shop, problems } = await setClamps(version, [
      { key: 'c600', length: '650000000', count: 3 },
      { key: null, length: '1200000000', count: 4 },
    ]);
    expect(problems).toEqual([]);
    expect(shop.clamps).toEqual([
      { key: 'c600', length: '650000000', count: 3 },
      { key: 'c1200', length: '1200000000', count: 4 },
    ]);
  });

  it('keeps those that are on a panel now', async () => {
    const { version } = await readShop();
    const kept = [{ key: 'c600', length: '650000000', count: 6 }];
    const set = await setClamps(version, kept);
    const batch = await newBatch(owner.caller, {
      designId: await newDesign(owner.caller),
      boards: 4,
    });
    await tryMove(owner.caller, batch, 'BLANK');
    await server.admin.query(
      `insert into occupation (shop_id, batch_id, resource, is_clamps, amount, step, piece, since)
       values ($1, $2, 'c600', true, 4, 'glue-1', 1, now())`,
      [localId('shop', owner.shopId), localId('batch', batch.id)],
    );
    const now = set.shop.version;
    expect(refusals(await setClamps(now, [{ ...kept[0], count: 3 }]))).toEqual([
      ['CLAMPS_IN_USE', 'clamps.0.count'],
    ]);
    expect(refusals(await setClamps(now, [{ ...kept[0], length: '700000000' }]))).toEqual([
      ['CLAMPS_IN_USE', 'clamps.0.length'],
    ]);
    const other = { key: null, length: '800000000', count: 1 };
    expect(refusals(await setClamps(now, [other]))).toEqual([['CLAMPS_IN_USE', 'clamps']]);
    expect(refusals(await setClamps(now, [{ ...kept[0], count: 4 }]))).toEqual([]);
  });

  it.each<[string, unknown, string]>([
    ['none', [], 'clamps'],
    ['a negative count', [{ key: null, length: '600000000', count: -1 }], 'clamps.0.count'],
    ['an absurd count', [{ key: null, length: '600000000', count: 2147483647 }], 'clamps.0.count'],
    ['an absurd length', [{ key: null, length: '999999999999999', count: 1 }], 'clamps.0.length'],
    ['an unknown class', [{ key: 'c9', length: '600000000', count: 1 }], 'clamps.0.key'],
    [
      'a key of 10,000 characters',
      [{ key: 'x'.repeat(10_000), length: '600000000', count: 1 }],
      'clamps.0.key',
    ],
  ])('refuses %s and changes nothing', async (_, clamps, field) => {
    const before = await readShop();
    const answer = await setClamps(before.version, clamps);
    expect(answer.problems.map((problem) => problem.field)).toContain(field);
    expect(answer.shop).toEqual(before);
  });
});

describe('designs', () => {
  beforeAll(async () => {
    owner = await newOwner(server);
  });

  it('need clamps that close across the strips, and along the board', async () => {
    const { design, problems } = await tryDesign(owner.caller, { name: ' Shoal ' });
    expect(problems).toEqual([]);
    expect(design).toMatchObject({
      name: 'Shoal',
      panelClamps: { count: 4, length: '290000000' },
      blockClamps: { count: 2, length: '400000000' },
    });
  });

  it('have names of their own', async () => {
    await newDesign(owner.caller, { name: 'Ember' });
    const again = await tryDesign(owner.caller, { name: 'Ember' });
    expect(again).toMatchObject({
      design: null,
      problems: [{ code: 'NAME_TAKEN', field: 'name' }],
    });
  });

  it.each<[string, object, string]>([
    ['an empty name', { name: ' ' }, 'name'],
    ['a name of 10,000 characters', { name: 'x'.repeat(10_000) }, 'name'],
    ['no length', { length: '0' }, 'length'],
    ['an absurd length', { length: '999999999999999' }, 'length'],
    ['no strips', { strips: [] }, 'strips'],
    [
      'an unknown wood',
      { strips: [{ species: 'plastic', width: '60000000' }] },
      'strips.0.species',
    ],
    ['too many slices', { slices: 2147483647 }, 'slices'],
    ['no boards of a group', { panelBoards: 0 }, 'panelBoards'],
    ['too many clamps', { panelClampCount: 41 }, 'panelClampCount'],
  ])('are refused with %s', async (_, changes, field) => {
    const refused = await tryDesign(owner.caller, changes);
    expect(refused.design).toBeNull();
    expect(refused.problems.map((problem) => problem.field)).toEqual([field]);
  });
});
