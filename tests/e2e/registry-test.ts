import { test as base, type BrowserContext } from '@playwright/test';
import { testPassword } from '#tests/support/test-client';
import { startRegistry, type RunningRegistry } from './running-registry';

/** Playwright's test with a running registry, one for each worker. */
export const test = base.extend<object, { registry: RunningRegistry }>({
  registry: [
    async ({}, use) => {
      const registry = await startRegistry();
      await use(registry);
      await registry.stop();
    },
    { scope: 'worker', timeout: 120_000 },
  ],
});

/** Signs a browser in past the form, for tests of what comes after. */
export async function signIn(
  context: BrowserContext, registry: RunningRegistry, email: string,
): Promise<void> {
  await context.request.get(`${registry.baseUrl}/api/session`);
  const { value } = (await context.cookies()).find(({ name }) => name === 'XSRF-TOKEN')
    ?? { value: '' };
  const answer = await context.request.post(`${registry.baseUrl}/api/session`, {
    data: { email, password: testPassword },
    headers: { 'X-XSRF-TOKEN': decodeURIComponent(value), Origin: registry.baseUrl },
  });
  if (!answer.ok()) throw new Error(`sign-in of ${email}: ${await answer.text()}`);
}
