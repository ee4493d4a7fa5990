import { AccountPages } from './pages/account-pages';
import { linkIn, waitForMail } from './pages/inbox';
import { newPerson } from './pages/people';
import { ProjectPages } from './pages/project-pages';
import { expect, test } from './pages/test';

test('an invitation by mail brings in a second person', async ({ page, browser }) => {
  const owner = newPerson('Mara Quist');
  const guest = newPerson('Tom Adeyemi');
  await new AccountPages(page).signUp(owner, 'Quist and Partners');

  await page.goto('/practice/people');
  const form = page.getByRole('form', { name: 'Invite somebody' });
  await form.getByLabel('E-mail').fill(guest.email);
  await form.getByRole('button', { name: 'Send the invitation' }).click();
  await expect(page.getByText(`The invitation to ${guest.email} is on its way.`)).toBeVisible();
  const link = linkIn(await waitForMail(guest.email, /invit|Quist/i), '/invitation/');

  const other = await browser.newPage();
  await other.goto(link); // a scanner looks first: the invitation must survive it
  await other.goto(link);
  await new AccountPages(other).acceptInvitation(link, guest);
  await expect(other.getByRole('banner')).toContainText(guest.name);

  await page.reload();
  await expect(page.getByRole('table', { name: 'Members' })).toContainText(guest.name);
  await other.goto(link);
  await expect(other.getByRole('heading', { name: 'This invitation no longer works' })).toBeVisible();
  await other.close();
});

test('a client sees the project but no draft', async ({ page, browser }) => {
  const owner = newPerson('Ada Brandt');
  const client = newPerson('Paul Meister');
  await new AccountPages(page).signUp(owner, 'Brandt Geotechnics');
  await page.goto('/practice/people');
  const form = page.getByRole('form', { name: 'Invite somebody' });
  await form.getByLabel('E-mail').fill(client.email);
  await form.getByLabel('Role').selectOption('client');
  await form.getByRole('button', { name: 'Send the invitation' }).click();
  const link = linkIn(await waitForMail(client.email, /invit|Brandt/i), '/invitation/');
  const other = await browser.newPage();
  await new AccountPages(other).acceptInvitation(link, client);

  const projects = new ProjectPages(page);
  const project = await projects.create({ number: '26-044', name: 'Mill Race', client: 'Meister Mill' });
  const section = await projects.beginSection(/wall in ground/i);
  await page.goto(project);
  await projects.appoint(client.name, 'client');

  await other.goto('/desk');
  await expect(other.getByText('Drafts are not shown to clients')).toBeVisible();
  await other.getByRole('link', { name: 'Mill Race' }).click();
  await expect(other.getByRole('heading', { level: 1, name: 'Mill Race' })).toBeVisible();
  await expect(other.getByText('Drafts are not shown to clients')).toBeVisible();
  await expect(other.locator(`a[href="${section}"]`)).toHaveCount(0);
  await other.goto(section);
  await expect(other.getByRole('heading', { level: 1 })).toContainText('nothing here');
  await other.close();
});
