import { AxeBuilder } from '@axe-core/playwright';
import type { Browser, WebSocketRoute } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { launchBrowser, newVisitor, signIn, type Visitor } from './browser';
import { FloorPage } from './floor-page';

const deep = process.env['DEEP'] === '1';
const TAGS = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'];
const PAGES = [
  '/floor',
  '/orders',
  '/designs',
  '/api',
  '/settings',
  '/settings/screens',
  '/sessions',
];
const SIZES = [
  { width: 1440, height: 900 },
  { width: 1024, height: 768 },
  { width: 390, height: 844 },
];

/** Every size in both schemes when run deep; else the widest by day and the narrowest by night. */
const LOOKS = deep
  ? SIZES.flatMap((size) => (['light', 'dark'] as const).map((scheme) => ({ size, scheme })))
  : [
      { size: SIZES[0], scheme: 'light' as const },
      { size: SIZES[2], scheme: 'dark' as const },
    ];

describe('every page', () => {
  let browser: Browser;

  beforeAll(async () => {
    browser = await launchBrowser();
  });

  afterAll(() => browser.close());

  it.each(LOOKS)(
    'has nothing that axe finds, and fits its width ($scheme, $size.width px)',
    async ({ size, scheme }) => {
      const visitor = await newVisitor(browser, { viewport: size ?? null, colorScheme: scheme });
      const { page } = visitor;
      await page.goto('/sign-in');
      await look(visitor, '/sign-in');
      await signIn(page, 'ines@example.com');
      for (const path of PAGES) {
        await page.goto(path);
        await page.locator('h1').first().waitFor();
        await page.locator('[aria-busy=true]').first().waitFor({ state: 'detached' });
        await look(visitor, path);
      }
      expect(visitor.complaints).toEqual([]);
      await visitor.context.close();
    },
    240_000,
  );

  async function look({ page }: Visitor, path: string): Promise<void> {
    const { violations } = await new AxeBuilder({ page }).withTags(TAGS).analyze();
    const found = violations.map(
      ({ id, nodes }) =>
        `${path}: ${id}: ${nodes
          .map((node) => node.target.join(' '))
          .slice(0, 3)
          .join(', ')}`,
    );
    expect(found).toEqual([]);
    const wider = await page.evaluate<number>(
      'document.documentElement.scrollWidth - document.documentElement.clientWidth',
    );
    expect(wider, `${path} scrolls sideways`).toBeLessThanOrEqual(0);
  }
});

describe('without a mouse', () => {
  let browser: Browser;

  beforeAll(async () => {
    browser = await launchBrowser();
  });

  afterAll(() => browser.close());

  it('a card is grabbed, carried, put back and dropped by keys, and stays in focus', async () => {
    const { page } = await newVisitor(browser);
    await signIn(page, 'olle@example.com');
    const floor = new FloorPage(page);
    await floor.open();
    const card = floor.column('Surface').locator('[data-part=card]').first();
    const code = /CT-\d+/.exec((await card.getAttribute('aria-label')) ?? '')?.[0] ?? '';
    const handle = floor.card(code).locator('[data-part=handle]');
    await handle.focus();
    await page.keyboard.press('Space');
    await expect.poll(() => handle.getAttribute('aria-pressed')).toBe('true');
    await page.keyboard.press('Escape');
    await expect.poll(() => handle.getAttribute('aria-pressed')).not.toBe('true');
    await floor.cardIn('Surface', code).waitFor();
    await handle.focus();
    await page.keyboard.press('Space');
    await page.keyboard.press('ArrowRight');
    await expect
      .poll(() => page.locator('.cdk-live-announcer-element').textContent())
      .toContain('Sand');
    await page.keyboard.press('Space');
    await floor.cardIn('Sand', code).waitFor();
    await expect
      .poll(() =>
        page.evaluate<string>('document.activeElement?.closest("[data-batch]")?.textContent ?? ""'),
      )
      .toContain(code);
  });

  it('a card is moved by its menu, and the move is undone', async () => {
    const { page } = await newVisitor(browser);
    await signIn(page, 'olle@example.com');
    const floor = new FloorPage(page);
    await floor.open();
    const card = floor.column('Surface').locator('[data-part=card]').first();
    const code = /CT-\d+/.exec((await card.getAttribute('aria-label')) ?? '')?.[0] ?? '';
    await floor.choose(code, /Move to/);
    const dialog = page.getByRole('dialog');
    await dialog.getByRole('button', { name: /^Sand/ }).click();
    await floor.cardIn('Sand', code).waitFor();
    await floor.choose(code, /Undo the last command/);
    await floor.cardIn('Surface', code).waitFor();
  });
});

describe('without a connection', () => {
  it('the Floor says since when it is old, and catches up by itself', async () => {
    const browser = await launchBrowser();
    const { page } = await newVisitor(browser);
    let isDown = false;
    const lines = new Set<WebSocketRoute>();
    await page.routeWebSocket('**/graphql', (line) => {
      if (isDown) {
        void line.close({ code: 1001 });
        return;
      }
      lines.add(line);
      line.connectToServer();
    });
    await signIn(page, 'mika@example.com');
    const floor = new FloorPage(page);
    await floor.open();
    await page.getByText(/^live/).first().waitFor();
    isDown = true;
    for (const line of lines) await line.close({ code: 1001 });
    await page
      .getByText(/offline since/i)
      .first()
      .waitFor({ timeout: 40_000 });
    await expect
      .poll(() => floor.card('CT-007').locator('[data-part=act]').getAttribute('aria-disabled'))
      .toBe('true');
    isDown = false;
    await page.getByText(/^live/).first().waitFor({ timeout: 40_000 });
    await browser.close();
  });
});
