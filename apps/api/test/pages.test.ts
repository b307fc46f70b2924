import { mkdirSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { getSession } from '@farlug/contract/routes';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { startTestApi, type TestApi } from './start-test-api.ts';

let api: TestApi;
beforeAll(async () => {
  api = await startTestApi();
});
afterAll(() => api.close());

const fetchText = async (address: string, headers: Record<string, string> = {}) => {
  const response = await fetch(`${api.url}${address}`, { headers });
  return { status: response.status, headers: response.headers, text: await response.text() };
};

describe('the built pages', () => {
  it('are what health waits for', async () => {
    expect(await fetchText('/healthz')).toMatchObject({
      status: 503,
      text: '{"ok":false,"database":true,"web":false}',
    });
    const web = api.deps.config.webDir;
    mkdirSync(path.join(web, 'assets'), { recursive: true });
    writeFileSync(path.join(web, 'index.html'), '<!doctype html><title>Farlug</title>');
    writeFileSync(path.join(web, 'assets/main-4fe1.js'), 'export {};');
    expect(await fetchText('/healthz')).toMatchObject({
      status: 200,
      text: '{"ok":true,"database":true,"web":true}',
    });
  });

  it('are the page at any address of its own, and always asked for again', async () => {
    for (const address of ['/', '/jobs/1/schedule', '/inspection?x=1']) {
      const { status, headers, text } = await fetchText(address, { accept: 'text/html' });
      expect(status).toBe(200);
      expect(text).toContain('<title>Farlug');
      expect(headers.get('cache-control')).toBe('no-cache');
    }
  });

  it('have files that a browser keeps, and no page in place of one that is missing', async () => {
    const { headers } = await fetchText('/assets/main-4fe1.js');
    expect(headers.get('cache-control')).toBe('public, max-age=31536000, immutable');
    const missing = await fetchText('/assets/main-0000.js', { accept: '*/*' });
    expect(missing.status).toBe(404);
    expect(missing.text).not.toContain('<title>');
    expect((await fetchText('/%2e%2e/package.json', { accept: 'application/json' })).status).toBe(404);
  });

  it('run only files of this origin', async () => {
    const { headers } = await fetchText('/', { accept: 'text/html' });
    const policy = headers.get('content-security-policy') ?? '';
    expect(policy).toContain("default-src 'none'");
    expect(policy).toContain("script-src 'self';");
    expect(policy).toContain("worker-src 'self';");
    expect(policy).not.toContain('upgrade-insecure-requests');
    expect(policy).not.toMatch(/script-src[^;]*unsafe/);
    expect(headers.get('x-content-type-options')).toBe('nosniff');
    expect(headers.get('x-powered-by')).toBeNull();
    expect(headers.get('strict-transport-security')).toBeNull();
  });
});

describe('an error', () => {
  it('has one shape and a number that is in the header too', async () => {
    const { status, headers, text } = await fetchText('/api/nowhere');
    expect(status).toBe(404);
    const { error } = JSON.parse(text);
    expect(error).toMatchObject({ code: 'not_found', details: [] });
    expect(error.requestId).toBe(headers.get('x-request-id'));
    expect(headers.get('cache-control')).toBe('no-store');
  });

  it('that nobody expected tells a stranger nothing, and is logged once with that number', async () => {
    const broken = await startTestApi();
    await broken.database.asOwner('alter table person rename to people');
    const { status, body } = await broken
      .client()
      .agent.post('/api/sign-in')
      .set(await tokenOf(broken))
      .send({ email: 'a@firm.example', password: 'x' });
    expect(status).toBe(500);
    expect(body.error).toMatchObject({ code: 'internal', details: [] });
    expect(JSON.stringify(body)).not.toMatch(/person|relation|select/);
    const lines = broken.logged.filter((line) => line.includes('unexpected error'));
    expect(lines).toHaveLength(1);
    expect(lines[0]).toContain(body.error.requestId);
    expect(broken.logged.join('')).not.toContain('farlug-csrf=');
    await broken.close();
  });

  it('answers what is not JSON, and not of this size', async () => {
    const client = api.client();
    const headers = await tokenOf(api);
    const post = (body: string) =>
      client.agent.post('/api/sign-in').set(headers).set('content-type', 'application/json').send(body);
    expect((await post('{"email":')).body.error.code).toBe('bad_request');
    expect((await post(`{"email":"${'x'.repeat(300_000)}"}`)).body.error.code).toBe('too_large');
  });
});

describe('over https', () => {
  it('cookies are held to host and https, and browsers told to stay there', async () => {
    const secure = await startTestApi({
      config: { publicUrl: 'https://farlug.firm.example', trustedProxies: 1 },
    });
    const response = await fetch(`${secure.url}${getSession.path}`, {
      headers: { 'x-forwarded-proto': 'https' },
    });
    expect(response.headers.get('set-cookie')).toMatch(
      /^__Host-farlug-csrf=.*Path=\/; HttpOnly; Secure; SameSite=Lax/,
    );
    expect(response.headers.get('strict-transport-security')).toMatch(/max-age=/);
    expect(response.headers.get('content-security-policy')).toContain('upgrade-insecure-requests');
    await secure.close();
  });
});

async function tokenOf(of: TestApi): Promise<Record<string, string>> {
  const response = await fetch(`${of.url}${getSession.path}`);
  const { csrfToken } = (await response.json()) as { csrfToken: string };
  const cookie = (response.headers.get('set-cookie') ?? '').split(';')[0] ?? '';
  return { 'x-csrf-token': csrfToken, cookie };
}
