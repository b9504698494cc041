import { mkdir } from 'node:fs/promises';
import path from 'node:path';
import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { repository } from '../server';
import { ask, launchBrowser, newVisitor, serverUrl, signIn, type Visitor } from './browser';
import { FloorPage } from './floor-page';

/*
 * The main job, from end to end: an order, a batch for it, dragged through the stages while the holds are enforced; a
 * helper's screen and the shop screen show it at once; an integrator's key reads where the order stands.
 */

const pictures = path.join(repository, 'test', 'pictures');
const LIVE = 4_000;

describe('a batch moves through the shop', () => {
  let browser: Browser;
  let owner: Visitor;
  let maker: Visitor;
  let helper: Visitor;
  let display: Visitor;
  let floor: FloorPage;
  let beside: FloorPage;
  let order = '';
  let code = '';

  beforeAll(async () => {
    await mkdir(pictures, { recursive: true });
    browser = await launchBrowser();
    owner = await newVisitor(browser);
    maker = await newVisitor(browser);
    helper = await newVisitor(browser);
    display = await newVisitor(browser, { viewport: { width: 1920, height: 1080 } });
    floor = new FloorPage(maker.page);
    beside = new FloorPage(helper.page);
  });

  afterAll(() => browser.close());

  const picture = (page: Page, name: string) =>
    page.screenshot({ path: path.join(pictures, `${name}.png`) });

  it('a display is paired by its code and shows the shop', async () => {
    await signIn(owner.page, 'ines@example.com');
    await display.page.goto('/screen');
    const shown = display.page.locator('.code');
    await shown.waitFor();
    const digits = (await shown.locator('[aria-hidden=true]').allTextContents())
      .join('')
      .replace(/\W/g, '');
    await owner.page.goto('/settings/screens');
    await owner.page.getByLabel('Code on the display').fill(digits);
    await owner.page.getByLabel('Name').fill('glue bench');
    await owner.page.getByRole('button', { name: 'Pair it' }).click();
    await owner.page.getByText('glue bench').first().waitFor();
    await display.page.getByText('Hands off until').waitFor();
  });

  it('an order is entered, and a maker makes a batch for it', async () => {
    const { designs } = await ask<{ designs: { id: string; name: string }[] }>(
      owner.page,
      '{ designs { id name } }',
    );
    const shoal = designs.find((design) => design.name === 'Shoal');
    const due = new Date(Date.now() + 21 * 86_400_000).toISOString().slice(0, 10);
    const { createOrder } = await ask<{
      createOrder: { order: { code: string } | null; problems: unknown[] };
    }>(
      owner.page,
      `mutation ($input: CreateOrderInput!) {
        createOrder(input: $input) { order { code } problems { sentence } }
      }`,
      {
        input: {
          customerName: 'Ada Winther',
          clientReference: 'web-7001',
          dueDate: due,
          lines: [{ designId: shoal?.id, count: 2 }],
        },
      },
    );
    expect(createOrder.problems).toEqual([]);
    order = createOrder.order?.code ?? '';
    await signIn(maker.page, 'olle@example.com');
    await maker.page.goto(`/orders/${order}`);
    await maker.page.getByRole('button', { name: /Make a batch/ }).click();
    const form = maker.page.getByRole('dialog');
    await form.getByLabel('Boards').fill('2');
    await form.getByRole('button', { name: /Make/ }).click();
    const made = maker.page.getByRole('status').filter({ hasText: 'was made' });
    await made.waitFor();
    code = /CT-\d+/.exec((await made.textContent()) ?? '')?.[0] ?? '';
    expect(code).toMatch(/^CT-\d+$/);
  });

  it('it is dragged onto the floor, and the helper sees it at once', async () => {
    await signIn(helper.page, 'mika@example.com');
    await beside.open();
    await floor.open();
    await floor.unfold('Queued');
    await floor.drag(code, 'Blank');
    await beside.cardIn('Blank', code).waitFor({ timeout: LIVE });
    await floor.drag(code, 'First glue-up');
    await beside.cardIn('First glue-up', code).waitFor({ timeout: LIVE });
  });

  it('a stage refuses it while the card is in the hand, and says why', async () => {
    await floor.carry(code, 'Slice');
    await expect.poll(() => floor.verdict('Slice').textContent()).toContain('glue-up');
    await floor.letGo();
    await floor.cardIn('First glue-up', code).waitFor();
  });

  it('the glue-up starts a hold that every screen shows and that refuses the next stage', async () => {
    await freeTheBench();
    await floor.act(code, /glue/i);
    await beside
      .cardIn('First glue-up', code)
      .getByText(/Finish glue-up/)
      .waitFor({ timeout: LIVE });
    await floor.act(code, /Finish glue-up/);
    const held = beside.cardIn('First glue-up', code).getByText(/clear/);
    await held.waitFor({ timeout: LIVE });
    await display.page.getByText(code).first().waitFor({ timeout: LIVE });
    await floor.carry(code, 'Slice');
    await expect
      .poll(() => floor.verdict('Slice').textContent())
      .toMatch(new RegExp(`Panel 1 of ${code} is in clamps until .*The glue .*needs 1 h at 20 °C`));
    await picture(maker.page, 'refusal');
    await floor.letGo();
    await floor.cardIn('First glue-up', code).waitFor();
  });

  it('what is sent straight to the API is refused alike, and a helper may not override', async () => {
    const { batch } = await ask<{ batch: { id: string; version: number } }>(
      helper.page,
      'query ($code: String!) { batch(code: $code) { id version } }',
      { code },
    );
    const move = (override: object | null, version = batch.version) =>
      ask<{ moveBatch: { problems: { code: string }[]; batch: { version: number } } }>(
        helper.page,
        `mutation ($input: MoveBatchInput!) {
          moveBatch(input: $input) { batch { version } problems { code sentence } }
        }`,
        { input: { batchId: batch.id, version, to: 'SLICE', override } },
      ).then((data) => data.moveBatch.problems.map((problem) => problem.code));
    expect(await move(null)).toEqual(['HOLD_RUNNING']);
    expect(await move({ reason: 'in a hurry', cautionRead: true })).toEqual(['FORBIDDEN']);
    expect(await move(null, batch.version - 1)).toEqual(['VERSION_CONFLICT']);
  });

  it('a maker overrides the hold with a reason, and the owner is told', async () => {
    await override('First glue-up', 'Slice');
    await beside.cardIn('Slice', code).waitFor({ timeout: LIVE });
    await beside
      .cardIn('Slice', code)
      .getByText(/hold overridden/)
      .waitFor();
    await owner.page.goto('/floor');
    await owner.page
      .getByText(/overrode a hold/)
      .first()
      .waitFor();
  });

  it('it goes on through slicing, the second glue-up and the rest to the final check', async () => {
    await floor.drag(code, 'Second glue-up');
    await freeTheBench();
    await floor.act(code, /glue/i);
    await floor.act(code, /Finish glue-up/);
    await override('Second glue-up', 'Surface');
    await floor.drag(code, 'Sand');
    await beside.cardIn('Sand', code).waitFor({ timeout: LIVE });
    await maker.page.goto(`/batch/${code}`);
    await maker.page
      .getByText(/overrode|overriding/)
      .first()
      .waitFor();
    await picture(maker.page, 'batch');
  });

  it('an integrator’s key reads where the order stands', async () => {
    await owner.page.goto('/api');
    await owner.page.getByRole('button', { name: 'New key' }).click();
    const form = owner.page.getByRole('dialog');
    await form.getByRole('textbox', { name: 'Name' }).fill('web shop');
    const scope = form.getByRole('checkbox').first();
    if (!(await scope.isChecked())) await scope.check();
    await form.getByRole('button', { name: /Make/ }).click();
    const key = /ctide_[0-9A-Za-z]{38}/.exec(
      await expect
        .poll(() => form.innerHTML())
        .toMatch(/ctide_[0-9A-Za-z]{38}/)
        .then(() => form.innerHTML()),
    )?.[0];
    const response = await fetch(`${serverUrl()}/graphql`, {
      method: 'POST',
      headers: { 'content-type': 'application/json', authorization: `Bearer ${key}` },
      body: JSON.stringify({
        query: `query ($code: String!) {
          order(code: $code) {
            status stage progressPercent forecastReadyAt clientReference customer { name }
            lines { status stage batchCodes }
          }
          floor { cursor }
        }`,
        variables: { code: order },
      }),
    });
    const refused = (await response.json()) as { errors: { extensions: { code: string } }[] };
    expect(refused.errors[0]?.extensions.code).toBe('FORBIDDEN');
    const again = await fetch(`${serverUrl()}/graphql`, {
      method: 'POST',
      headers: { 'content-type': 'application/json', authorization: `Bearer ${key}` },
      body: JSON.stringify({
        query: `{ order(code: "${order}") {
          status stage progressPercent forecastReadyAt clientReference customer { name }
          lines { status stage batchCodes }
        } }`,
      }),
    });
    const answer = (await again.json()) as { data: { order: Record<string, unknown> } };
    expect(answer.data.order).toMatchObject({
      status: 'IN_WORK',
      stage: 'SAND',
      clientReference: 'web-7001',
      customer: null,
      lines: [{ status: 'IN_WORK', stage: 'SAND', batchCodes: [code] }],
    });
    expect(answer.data.order['progressPercent']).toBeGreaterThan(30);
    expect(answer.data.order['forecastReadyAt']).toMatch(/^20\d\d-/);
  });

  it('pictures of what people see', async () => {
    await floor.open();
    await maker.page.waitForTimeout(500);
    await picture(maker.page, 'floor');
    await picture(display.page, 'shop-screen');
    await owner.page.goto(`/orders/${order}`);
    await owner.page.getByRole('heading', { name: order }).waitFor();
    await picture(owner.page, 'order');
    const night = await newVisitor(browser, {
      colorScheme: 'dark',
      viewport: { width: 1024, height: 768 },
    });
    await signIn(night.page, 'mika@example.com');
    await new FloorPage(night.page).open();
    await night.page.waitForTimeout(500);
    await picture(night.page, 'floor-dark');
    const phone = await newVisitor(browser, {
      viewport: { width: 390, height: 844 },
      hasTouch: true,
      isMobile: true,
    });
    await signIn(phone.page, 'mika@example.com');
    await phone.page.goto('/floor');
    await phone.page.locator('[data-part=card]').first().waitFor();
    await picture(phone.page, 'floor-phone');
  });

  it('nothing was complained of, and no other host was asked', () => {
    const all = [owner, maker, helper, display].flatMap((visitor) => visitor.complaints);
    expect(all).toEqual([]);
  });

  /** The demo's crew is gluing too: its work at the bench is finished, and clamps that are clear are taken off. */
  async function freeTheBench(): Promise<void> {
    const { floor: read } = await ask<{
      floor: {
        batches: {
          id: string;
          code: string;
          version: number;
          runs: {
            step: string;
            piece: number;
            startedAt: string | null;
            finishedAt: string | null;
          }[];
        }[];
      };
    }>(
      maker.page,
      '{ floor { batches { id code version runs { step piece startedAt finishedAt } } } }',
    );
    const give = async (kind: 'startStep' | 'finishStep', input: object) =>
      ask<Record<string, { batch: { version: number } | null; problems: { code: string }[] }>>(
        maker.page,
        `mutation ($input: StepCommandInput!) {
          ${kind}(input: $input) { batch { version } problems { code } }
        }`,
        { input },
      ).then((data) => data[kind]);
    for (const batch of read.batches) {
      if (batch.code === code) continue;
      let { version } = batch;
      for (const n of [1, 2]) {
        const glueing = batch.runs.filter(
          (run) => run.step === `glue-${n}` && run.startedAt && !run.finishedAt,
        );
        if (glueing.length > 0) {
          const done = await give('finishStep', {
            batchId: batch.id,
            version,
            step: `glue-${n}`,
            pieces: glueing.map((run) => run.piece),
          });
          version = done?.batch?.version ?? version;
        }
        for (const run of batch.runs.filter((each) => each.step === `glue-${n}`)) {
          const command = { batchId: batch.id, step: `unclamp-${n}`, pieces: [run.piece] };
          const started = await give('startStep', { ...command, version });
          version = started?.batch?.version ?? version;
          const ended = await give('finishStep', { ...command, version });
          version = ended?.batch?.version ?? version;
        }
      }
    }
  }

  /** Cuts one hold after the other short, doing the work between them, until the card stands in the next stage. */
  async function override(from: string, to: string): Promise<void> {
    for (let round = 0; round < 12 && !(await floor.cardIn(to, code).isVisible()); round++) {
      const finish = floor
        .cardIn(from, code)
        .locator('[data-part=act]')
        .filter({ hasText: /Finish/ });
      if (await finish.isVisible()) {
        await floor.act(code, /Finish/);
        await finish.waitFor({ state: 'hidden' });
        continue;
      }
      await floor.choose(code, /Override/);
      const dialog = maker.page.getByRole('dialog');
      await dialog.getByRole('checkbox').check();
      await dialog.getByRole('textbox').fill('the market is tomorrow, the joint was checked');
      await dialog.getByRole('button').last().click();
      await dialog.waitFor({ state: 'hidden' });
      await maker.page.waitForTimeout(300);
    }
    await floor.cardIn(to, code).waitFor();
  }
});
