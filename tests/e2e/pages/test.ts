import { test as base, expect } from '@playwright/test';

/** Every test of the pages fails on a breach of the content policy or an error in the browser's log. */
export const test = base.extend<{ quietBrowser: void; allowedLog: RegExp[] }>({
  allowedLog: [[], { option: true }],
  quietBrowser: [
    async ({ context, allowedLog }, use) => {
      const findings: string[] = [];
      await context.addInitScript(() => {
        document.addEventListener('securitypolicyviolation', (event) =>
          console.error(`policy: ${event.violatedDirective} ${event.blockedURI} ${event.sample}`),
        );
      });
      context.on('console', (message) => {
        if (message.type() === 'error') findings.push(message.text());
      });
      context.on('weberror', (error) => findings.push(error.error().message));
      await use();
      expect(findings.filter((line) => !allowedLog.some((allowed) => allowed.test(line)))).toEqual([]);
    },
    { auto: true },
  ],
});

export { expect };
