import type { Locator, Page } from 'playwright-core';

/** What a person does on the Floor. */
export class FloorPage {
  constructor(readonly page: Page) {}

  async open(): Promise<void> {
    await this.page.goto('/floor');
    await this.page.locator('[data-part=card]').first().waitFor();
  }

  column(name: string): Locator {
    return this.page.locator('section.column').and(this.page.getByLabel(name, { exact: true }));
  }

  card(code: string): Locator {
    return this.page
      .locator('[data-part=card]')
      .filter({ has: this.page.getByText(code, { exact: true }) });
  }

  cardIn(column: string, code: string): Locator {
    return this.column(column).locator('[data-part=card]').filter({ hasText: code });
  }

  /** Opens the strip at an edge of the board. */
  async unfold(name: string): Promise<void> {
    const edge = this.column(name).getByRole('button', { name, expanded: false });
    if (await edge.isVisible()) await edge.click();
  }

  /** Lifts a card and carries it over a column without letting go. */
  async carry(code: string, to: string): Promise<void> {
    const card = this.card(code);
    await card.scrollIntoViewIfNeeded();
    const from = await card.boundingBox();
    const target = await this.column(to).boundingBox();
    if (!from || !target) throw new Error(`${code} or ${to} cannot be seen`);
    const { mouse } = this.page;
    await mouse.move(from.x + from.width / 2, from.y + 12);
    await mouse.down();
    await mouse.move(from.x + from.width / 2 + 12, from.y + 20, { steps: 4 });
    await mouse.move(target.x + target.width / 2, target.y + 120, { steps: 14 });
    await this.page.waitForTimeout(150);
  }

  async letGo(): Promise<void> {
    await this.page.mouse.up();
  }

  async drag(code: string, to: string): Promise<void> {
    await this.carry(code, to);
    await this.letGo();
    await this.cardIn(to, code).waitFor();
  }

  /** What a column says while a card is held over the board. */
  verdict(column: string): Locator {
    return this.column(column).locator('.verdict');
  }

  /** Presses the card's next action; with several pieces takes them all at once. */
  async act(code: string, words: RegExp): Promise<void> {
    const button = this.card(code).locator('[data-part=act]').filter({ hasText: words });
    await button.click();
    const menu = this.page.getByRole('menu');
    if (await menu.isVisible()) {
      // All pieces at once stand last.
      await menu.getByRole('menuitem').last().click();
    }
  }

  async choose(code: string, item: RegExp): Promise<void> {
    await this.card(code).locator('[data-part=menu]').click();
    await this.page.getByRole('menuitem', { name: item }).first().click();
  }
}
