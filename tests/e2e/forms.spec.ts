import { AccountPages } from './pages/account-pages';
import { linkIn, waitForMail } from './pages/inbox';
import { newPerson } from './pages/people';
import { ProjectPages } from './pages/project-pages';
import { expect, test } from './pages/test';

test('sign-up says what to mend, beside each field', async ({ page }) => {
  await page.goto('/sign-up');
  await page.getByRole('button', { name: 'Set up the practice' }).click();
  await expect(page.getByRole('textbox', { name: 'Practice' })).toHaveAccessibleDescription(
    /Write the name of your practice/,
  );
  await expect(page.getByRole('textbox', { name: 'Practice' })).toBeFocused();
  await page.getByRole('textbox', { name: 'Practice' }).fill('Falk Ground Engineers');
  await page.getByLabel('E-mail').fill('ines@falk');
  await page.getByLabel('Password').fill('short');
  await page.getByRole('button', { name: 'Set up the practice' }).click();
  await expect(page.getByLabel('E-mail')).toHaveAccessibleDescription(/Write a whole e-mail address/);
  await expect(page.getByLabel('Password')).toHaveAccessibleDescription(/at least 12 characters/i);
  await expect(page.getByRole('textbox', { name: 'Practice' })).toHaveValue('Falk Ground Engineers');
});

test('sign-in tells a stranger and a wrong password the same thing', async ({ page }) => {
  const person = newPerson('Olga Brook');
  await new AccountPages(page).signUp(person, 'Brook and Sons');
  await new AccountPages(page).signOut();
  const tried: string[] = [];
  for (const [email, password] of [
    [person.email, 'not the right sentence'],
    ['nobody.at.all@harrow.example', 'not the right sentence'],
  ] as const) {
    await page.goto('/sign-in');
    await page.getByLabel('E-mail').fill(email);
    await page.getByLabel('Password').fill(password);
    await page.getByRole('button', { name: 'Sign in' }).click();
    const said = page.getByRole('form', { name: 'Sign in' }).getByRole('alert');
    await expect(said).not.toBeEmpty();
    tried.push(await said.innerText());
    await expect(page.getByLabel('E-mail')).toHaveValue(email);
  }
  expect(tried[0]).not.toBe('');
  expect(tried[0]).toBe(tried[1]);
});

test.describe('with the network away', () => {
  test.use({ allowedLog: [/ERR_INTERNET_DISCONNECTED|Failed to fetch|ERR_FAILED/] });

  test('a form keeps what was typed and goes through when it is back', async ({ page, context }) => {
    await new AccountPages(page).signUp(newPerson('Jon Vale'), 'Vale Dams');
    await page.goto('/projects/new');
    await page.getByLabel('Number').fill('26-310');
    await page.getByLabel('Name', { exact: true }).fill('Vale Sluice');
    await context.setOffline(true);
    await page.getByRole('button', { name: 'Create the project' }).click();
    await expect(page.getByRole('form').getByRole('alert')).toContainText(
      'Everything you typed is still here',
    );
    await expect(page.getByLabel('Name', { exact: true })).toHaveValue('Vale Sluice');
    await context.setOffline(false);
    await page.getByRole('button', { name: 'Try again' }).click();
    await expect(page.getByRole('heading', { level: 1, name: 'Vale Sluice' })).toBeVisible();
  });
});

test('a section document is read with every error at its place', async ({ page }) => {
  await new AccountPages(page).signUp(newPerson('Rea Stone'), 'Stone Levees');
  const project = await new ProjectPages(page).create({ number: '26-007', name: 'North Levee' });
  await page.goto(`${project}/sections/new`);
  const form = page.getByRole('form', { name: 'Section document' });
  await form.getByLabel('Section document').fill('{ "format": "underfall-section/1", "title": ');
  await form.getByRole('button', { name: 'Read and create' }).click();
  await expect(form.getByRole('alert')).toContainText(/JSON/);
  const outline = [
    [0, 0],
    [10, 0],
    [10, -5],
    [0, -5],
  ];
  const broken = {
    format: 'underfall-section/1',
    title: 'Weir',
    geometry: 'plane',
    materials: [{ id: 'sand', name: 'Sand', kMajor: -1, kMinor: 1e-5 }],
    zones: [{ id: 'z', material: 'sand', outline }],
    situations: [{ id: 'flood', levels: {} }],
  };
  await form.getByLabel('Section document').fill(JSON.stringify(broken));
  await form.getByRole('button', { name: 'Read and create' }).click();
  await expect(form.getByRole('alert')).toContainText('must be greater than 0 m/s');
  await expect(form.getByRole('alert')).toContainText('/materials/0/kMajor');
  await expect(form.getByLabel('Section document')).toHaveValue(JSON.stringify(broken));
});

test('a criterion is added, edited and removed; an example is adopted', async ({ page }) => {
  await new AccountPages(page).signUp(newPerson('Kit Marsh'), 'Marsh Consulting');
  await page.goto('/practice/criteria');
  await page.getByRole('button', { name: 'Add a criterion' }).click();
  const dialog = page.getByRole('dialog');
  await dialog.getByRole('button', { name: 'Keep' }).click();
  await expect(dialog.getByLabel('At least')).toHaveAccessibleDescription('Write the least value.');
  await expect(dialog.getByLabel('Source')).toHaveAccessibleDescription(/where the value comes from/);
  await dialog.getByLabel('At least').fill('1,5');
  await dialog.getByLabel('Title').fill('Office rule for heave');
  await dialog.getByLabel('On', { exact: true }).selectOption('heave-prism-effective');
  await dialog.getByLabel('Source').fill('Office manual, section 4, 2025');
  await dialog.getByRole('button', { name: 'Keep' }).click();
  await expect(dialog).toBeHidden();
  const entry = page.getByRole('listitem').filter({ hasText: 'Office rule for heave' });
  await expect(entry).toContainText('1.5');
  await entry.getByRole('button', { name: 'Edit' }).click();
  await dialog.getByLabel('At least').fill('1.75');
  await dialog.getByRole('button', { name: 'Keep' }).click();
  await expect(entry).toContainText('1.75');
  await entry.getByRole('button', { name: 'Remove' }).click();
  await dialog.getByRole('button', { name: 'Remove' }).click();
  await expect(entry).toHaveCount(0);
  const adopt = page.getByRole('button', { name: /^Adopt / }).first();
  const title = (await adopt.getAttribute('aria-label'))!.replace('Adopt ', '');
  await adopt.click();
  await dialog.getByRole('button', { name: 'Adopt' }).click();
  await expect(dialog).toBeHidden();
  await expect(page.getByRole('button', { name: `Edit ${title}` })).toBeVisible();
});

test('a token is shown once, opens the API, and stops when it is revoked', async ({ page, request }) => {
  await new AccountPages(page).signUp(newPerson('Lev Arden'), 'Arden Hydraulics');
  await page.goto('/practice/tokens');
  await page.getByLabel('What for').fill('nightly comparison');
  await page.getByRole('button', { name: 'Make the token' }).click();
  const secret = await page.getByTestId('token').innerText();
  const read = () => request.get('/api/v1/sections', { headers: { authorization: `Bearer ${secret}` } });
  expect((await read()).status()).toBe(200);
  await page.reload();
  await expect(page.getByRole('table', { name: 'Tokens' })).toContainText('nightly comparison');
  await expect(page.getByText(secret)).toHaveCount(0);
  await page.getByRole('button', { name: 'Revoke the token nightly comparison' }).click();
  await page.getByRole('dialog').getByRole('button', { name: 'Revoke' }).click();
  await expect(page.getByText('No tokens yet.')).toBeVisible();
  expect((await read()).status()).toBe(401);
});

test('a forgotten password is set anew by mail, once', async ({ page }) => {
  const person = newPerson('Una Holt');
  await new AccountPages(page).signUp(person, 'Holt Rivers');
  await new AccountPages(page).signOut();
  await page.goto('/forgot');
  await page.getByLabel('E-mail').fill(person.email);
  await page.getByRole('button', { name: 'Send me a link' }).click();
  await expect(page.getByRole('status')).toContainText('Look in your inbox');
  const link = linkIn(await waitForMail(person.email, /password/i), '/reset/');
  await page.goto(link);
  await page.goto(link);
  await page.getByRole('textbox', { name: 'New password' }).fill('another long sentence');
  await page.getByRole('button', { name: 'Set the new password' }).click();
  await page.waitForURL('**/sign-in');
  await page.goto(link);
  await expect(page.getByRole('heading', { name: 'This link no longer works' })).toBeVisible();
  await new AccountPages(page).signIn({ email: person.email, password: 'another long sentence' });
});
