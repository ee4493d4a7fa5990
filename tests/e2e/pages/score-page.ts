import { expect, type Locator, type Page } from '@playwright/test';
import { AccountPages } from './account-pages';
import { newPerson } from './people';
import { ProjectPages } from './project-pages';

/** The working screen of one section. */
export class ScorePage {
  readonly answer: Locator;
  readonly keeping: Locator;
  readonly tip: Locator;

  constructor(readonly page: Page) {
    this.answer = page.getByRole('status', { name: 'Answer' });
    this.keeping = page.getByRole('status', { name: 'Keeping' });
    this.tip = page.getByRole('slider', { name: /^Tip of Sheet pile/ });
  }

  /** Signs somebody new up and opens a starting point: a section that no other test touches. */
  async openFresh(startingPoint = /wall in ground/i): Promise<void> {
    await new AccountPages(this.page).signUp(newPerson('Odile Marsh'), 'Marsh Foundations');
    const projects = new ProjectPages(this.page);
    await projects.create({ number: '26-100', name: 'Quay wall', client: '' });
    await projects.beginSection(startingPoint);
    await this.waitForAnswer();
  }

  async waitForAnswer(): Promise<void> {
    await expect(this.answer.locator('[data-part=discharge]')).toBeVisible({ timeout: 30_000 });
    await expect(this.answer).toHaveAttribute('aria-busy', 'false');
  }

  /** Lower end of the discharge as shown, l/s per metre. */
  async readDischarge(): Promise<number> {
    const text = await this.answer.locator('[data-part=discharge]').innerText();
    return Number(/[\d.]+/.exec(text)![0]);
  }

  async waitUntilKept(): Promise<void> {
    await expect(this.keeping).toContainText('All changes kept', { timeout: 20_000 });
  }

  /** Drags the tip by pixels, in steps as a hand would. */
  async dragTip(dy: number): Promise<void> {
    const box = (await this.tip.boundingBox())!;
    const [x, y] = [box.x + box.width / 2, box.y + box.height / 2];
    await this.page.mouse.move(x, y);
    await this.page.mouse.down();
    for (let i = 1; i <= 8; i++) await this.page.mouse.move(x, y + (dy * i) / 8);
    await this.page.mouse.up();
  }
}
