import { AccountPages } from './pages/account-pages';
import { newPerson } from './pages/people';
import { ProjectPages } from './pages/project-pages';
import { expect, test } from './pages/test';

test('from sign-up to the first answer', async ({ page }) => {
  const person = newPerson('Ines Falk');
  await new AccountPages(page).signUp(person, 'Falk Ground Engineers');
  await expect(page.getByRole('heading', { level: 1, name: 'Desk' })).toBeVisible();
  await page.getByRole('link', { name: 'Open the first project' }).click();
  const projects = new ProjectPages(page);
  await projects.create({ number: '26-001', name: 'Lower Weir', client: 'Town of Aldern' });
  await projects.beginSection(/wall in ground/i);
  await expect(page.getByRole('status', { name: 'Answer' })).toContainText(/\d/, { timeout: 20_000 });
});
