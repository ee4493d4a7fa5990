import type { Page } from '@playwright/test';
import { AccountPages } from './pages/account-pages';
import { expectNoAxeFindings, expectNoSidewaysScroll } from './pages/looks';
import { newPerson } from './pages/people';
import { ProjectPages } from './pages/project-pages';
import { expect, test } from './pages/test';

const open = [
  '/',
  '/sign-in',
  '/sign-up',
  '/forgot',
  '/reset/unknown',
  '/invitation/unknown',
  '/api-reference',
  '/no-such-page',
];
const closed = [
  '/desk',
  '/projects',
  '/projects/new',
  '/practice/people',
  '/practice/criteria',
  '/practice/materials',
  '/practice/tokens',
  '/practice/log',
  '/account',
];
const widths = [390, 1024, 1440, 2560];

test.use({ allowedLog: [/status of 404/] });

async function lookAt(page: Page, address: string): Promise<void> {
  await page.setViewportSize({ width: 1440, height: 900 });
  await page.goto(address);
  await expect(page.getByRole('heading', { level: 1 })).toBeVisible();
  await expectNoAxeFindings(page);
  for (const width of widths) {
    await page.setViewportSize({ width, height: 900 });
    await expectNoSidewaysScroll(page);
  }
  await page.setViewportSize({ width: 390, height: 844 });
  await expectNoAxeFindings(page);
}

for (const address of open) {
  test(`${address} is readable by everyone and fits every width`, async ({ page }) => {
    await lookAt(page, address);
  });
}

test.describe('inside the workspace', () => {
  test.describe.configure({ timeout: 240_000 });

  test('every page is readable by everyone and fits every width', async ({ page }) => {
    await new AccountPages(page).signUp(newPerson('Vera Lindqvist'), 'Lindqvist Embankments');
    await lookAt(page, '/desk');
    const projects = new ProjectPages(page);
    const project = await projects.create({
      number: '26-112',
      name: 'A long name, so that it has to break: barrage of the lower Aldern at Mill Bend',
      client: 'Aldern Water Board',
    });
    const section = await projects.beginSection(/wall in ground/i);
    for (const address of [
      ...closed,
      project,
      `${project}/sections/new`,
      `${project}/sections/00000000-0000-4000-8000-000000000000`,
    ]) {
      await test.step(address, () => lookAt(page, address));
    }
    await test.step('the score', async () => {
      await page.setViewportSize({ width: 1440, height: 900 });
      await page.goto(section);
      await expect(page.getByRole('status', { name: 'Answer' })).toContainText(/\d/, { timeout: 20_000 });
      await expectNoAxeFindings(page);
      for (const width of widths) {
        await page.setViewportSize({ width, height: 900 });
        await expectNoSidewaysScroll(page);
      }
    });
  });
});
