import { expect, type Page } from '@playwright/test';

/** The list of projects, a project, a new section. */
export class ProjectPages {
  constructor(private readonly page: Page) {}

  /** Creates a project and stays on its page; returns its address. */
  async create(project: { number: string; name: string; client?: string }): Promise<string> {
    await this.page.goto('/projects/new');
    await this.page.getByLabel('Number').fill(project.number);
    await this.page.getByLabel('Name', { exact: true }).fill(project.name);
    if (project.client) await this.page.getByLabel(/^For/).fill(project.client);
    await this.page.getByRole('button', { name: 'Create the project' }).click();
    await expect(this.page.getByRole('heading', { level: 1, name: project.name })).toBeVisible();
    return new URL(this.page.url()).pathname;
  }

  /** Begins a section of the project on screen from a starting point; waits for its page. */
  async beginSection(startingPoint: string | RegExp): Promise<string> {
    await this.page.getByRole('link', { name: 'New section' }).click();
    const entry = this.page.getByRole('listitem').filter({
      has: this.page.getByRole('heading', { level: 3, name: startingPoint }),
    });
    await entry.getByRole('button', { name: 'Begin with this' }).click();
    await this.page.waitForURL(/\/projects\/[^/]+\/sections\/(?!new)[^/]+$/);
    return new URL(this.page.url()).pathname;
  }

  async appoint(person: string, part: 'author' | 'checker' | 'approver' | 'client'): Promise<void> {
    const form = this.page.getByRole('form', { name: 'Appoint somebody' });
    const option = form.getByLabel('Person').locator('option', { hasText: person });
    await form.getByLabel('Person').selectOption(await option.getAttribute('value'));
    await form.getByLabel('Part').selectOption(part);
    await form.getByRole('button', { name: 'Appoint' }).click();
    await expect(this.page.getByRole('button', { name: `Remove ${person} as ${part}` })).toBeVisible();
  }
}
