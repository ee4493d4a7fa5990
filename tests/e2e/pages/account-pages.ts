import { expect, type Page } from '@playwright/test';
import type { Person } from './people';

/** Sign-up, sign-in, sign-out. */
export class AccountPages {
  constructor(private readonly page: Page) {}

  async signUp(person: Person, practice: string): Promise<void> {
    await this.page.goto('/sign-up');
    await this.page.getByRole('textbox', { name: 'Practice' }).fill(practice);
    await this.page.getByLabel('Your name').fill(person.name);
    await this.page.getByLabel('E-mail').fill(person.email);
    await this.page.getByLabel('Password').fill(person.password);
    await this.page.getByRole('button', { name: 'Set up the practice' }).click();
    await this.page.waitForURL('**/desk');
  }

  async signIn(person: Pick<Person, 'email' | 'password'>): Promise<void> {
    await this.page.goto('/sign-in');
    await this.page.getByLabel('E-mail').fill(person.email);
    await this.page.getByLabel('Password').fill(person.password);
    await this.page.getByRole('button', { name: 'Sign in' }).click();
    await this.page.waitForURL('**/desk');
    await expect(this.page.getByRole('heading', { level: 1, name: 'Desk' })).toBeVisible();
  }

  async signOut(): Promise<void> {
    await this.page.getByRole('banner').getByRole('button').click();
    await this.page.getByRole('menuitem', { name: 'Sign out' }).click();
    await this.page.waitForURL((url) => url.pathname === '/');
  }

  /** Takes up an invitation by the address in the mail. */
  async acceptInvitation(address: string, person: Person): Promise<void> {
    await this.page.goto(address);
    await this.page.getByLabel('Your name').fill(person.name);
    await this.page.getByLabel('Password').fill(person.password);
    await this.page.getByRole('button', { name: /^Join / }).click();
    await this.page.waitForURL('**/desk');
  }
}
