import { chromium, type Browser, type BrowserContext, type Page } from 'playwright-core';
import { DEMO_PASSWORD } from '#server/demo/cast';
import { chromiumPath } from '../server';

/** The server that the browser project's set-up started. */
export function serverUrl(): string {
  const url = process.env['TEST_SERVER_URL'];
  if (!url) throw new Error('No server was started for the browser tests.');
  return url;
}

/** Debian's Chromium without anything that would talk to the outside. */
export function launchBrowser(): Promise<Browser> {
  return chromium.launch({
    executablePath: chromiumPath(),
    args: [
      '--no-sandbox',
      '--disable-gpu',
      '--disable-quic',
      '--no-first-run',
      '--disable-background-networking',
      '--disable-component-update',
      '--disable-sync',
    ],
  });
}

/** One browser of one person or display, with what its console complained of and which other hosts it asked. */
export interface Visitor {
  context: BrowserContext;
  page: Page;
  complaints: string[];
}

export async function newVisitor(
  browser: Browser,
  options: Parameters<Browser['newContext']>[0] = {},
): Promise<Visitor> {
  const context = await browser.newContext({
    viewport: { width: 1440, height: 900 },
    reducedMotion: 'reduce',
    baseURL: serverUrl(),
    ...options,
  });
  const page = await context.newPage();
  page.setDefaultTimeout(15_000);
  const complaints: string[] = [];
  page.on('console', (message) => {
    if (message.type() === 'error') complaints.push(message.text());
  });
  page.on('pageerror', (error) => complaints.push(error.message));
  page.on('request', (request) => {
    const { host, protocol } = new URL(request.url());
    if (protocol.startsWith('http') && host !== new URL(serverUrl()).host) {
      complaints.push(`asked another host: ${request.url()}`);
    }
  });
  return { context, page, complaints };
}

/** Signs in through the form, as a person does, and waits for the page that comes after. */
export async function signIn(page: Page, email: string, password = DEMO_PASSWORD): Promise<void> {
  await page.goto('/sign-in');
  await page.getByLabel('E-mail address').fill(email);
  await page.getByLabel('Password').fill(password);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await page.waitForURL((url) => !url.pathname.startsWith('/sign-in'));
}

/** Asks the API with the browser's own session. */
export async function ask<Data>(
  page: Page,
  query: string,
  variables: Record<string, unknown> = {},
): Promise<Data> {
  const response = await page.request.post('/graphql', { data: { query, variables } });
  const body = (await response.json()) as { data?: Data; errors?: unknown };
  if (!body.data || body.errors) throw new Error(JSON.stringify(body.errors));
  return body.data;
}
