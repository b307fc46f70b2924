import { type Browser, type BrowserContext, chromium, type Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, expect } from 'vitest';

const QUIET = [
  '--no-sandbox',
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
];
const PATIENCE_MS = 20_000;
const LOOPBACK = new Set(['127.0.0.1', 'localhost', '[::1]']);

export const DESK = { width: 1440, height: 900 };
export const PHONE = { width: 390, height: 844 };

export const product = (path = '/'): string => new URL(path, process.env.FARLUG_URL).href;

/** Somebody at a browser of their own, who knows nothing of the others. */
export interface Visitor {
  page: Page;
  /** A refusal by the server that this story provokes: the browser reports it as an error of the page. */
  provokes: (status: number) => void;
}

let browser: Browser;
const contexts: BrowserContext[] = [];
const faults: string[] = [];

/** A browser for the tests of a file; what goes wrong in any page, or leaves the machine, fails the test. */
export function withBrowser(): void {
  beforeAll(async () => {
    browser = await chromium.launch({ executablePath: process.env.CHROMIUM_PATH ?? '', args: QUIET });
  });
  afterEach(async () => {
    await Promise.all(contexts.splice(0).map((context) => context.close()));
    expect(faults.splice(0), 'what the pages reported').toEqual([]);
  });
  afterAll(() => browser.close());
}

export async function visitor(
  options: { viewport?: { width: number; height: number }; locale?: string } = {},
): Promise<Visitor> {
  const context = await browser.newContext({
    viewport: DESK,
    locale: 'en-US',
    timezoneId: 'UTC',
    reducedMotion: 'reduce',
    acceptDownloads: true,
    ...options,
  });
  context.setDefaultTimeout(PATIENCE_MS);
  contexts.push(context);
  const provoked = new Set<string>();
  context.on('request', (request) => {
    const { protocol, hostname, origin } = new URL(request.url());
    if (/^(https?|wss?):$/.test(protocol) && !LOOPBACK.has(hostname)) faults.push(`asked ${origin}`);
  });
  context.on('weberror', (error) => faults.push(error.error().stack ?? error.error().message));
  context.on('console', (message) => {
    const status = /responded with a status of (\d+)/.exec(message.text())?.[1];
    if (message.type() !== 'error' || (status && provoked.has(status))) return;
    faults.push(`${message.text()} (${message.location().url})`);
  });
  return {
    page: await context.newPage(),
    provokes: (status) => void provoked.add(String(status)),
  };
}
