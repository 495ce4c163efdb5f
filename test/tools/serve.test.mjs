import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { get } from 'node:http';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { serve } from '../../src/tools/serve.mjs';

let root;
let server;

/** Asks for the path as written: fetch would tidy the dots away. */
function ask(path, method = 'GET') {
  const { hostname, port } = new URL(server.url);
  return new Promise((done, fail) => {
    get({ hostname, port, path, method, family: 4 }, (response) => {
      let body = '';
      response.on('data', (part) => (body += part));
      response.on('end', () => done({ status: response.statusCode, type: response.headers['content-type'], policy: response.headers['content-security-policy'], body }));
    }).on('error', fail);
  });
}

beforeAll(async () => {
  root = mkdtempSync(join(tmpdir(), 'halfmark-serve-'));
  mkdirSync(join(root, 'dist/assets'), { recursive: true });
  writeFileSync(join(root, 'dist/index.html'), 'page');
  writeFileSync(join(root, 'dist/assets/a b.js'), 'script');
  writeFileSync(join(root, 'secret.txt'), 'secret');
  mkdirSync(join(root, 'dist-old'));
  writeFileSync(join(root, 'dist-old/secret.txt'), 'secret');
  server = await serve(0, join(root, 'dist'));
});

afterAll(async () => {
  await server.close();
  rmSync(root, { recursive: true, force: true });
});

describe('the server of the built page', () => {
  it('answers a folder with its page and gives scripts their type', async () => {
    expect(await ask('/')).toMatchObject({ status: 200, type: 'text/html; charset=utf-8', body: 'page' });
    expect(await ask('/assets/a%20b.js?x=1')).toMatchObject({ status: 200, type: 'text/javascript; charset=utf-8', body: 'script' });
  });

  it('sends the security policy with every answer', async () => {
    for (const path of ['/', '/nothing']) expect((await ask(path)).policy).toContain("script-src 'self';");
  });

  it('gives nothing outside its folder', async () => {
    for (const path of ['/../secret.txt', '/%2e%2e/secret.txt', '/..%2fsecret.txt', '/..%2fdist-old/secret.txt', '/assets/..%2f..%2fsecret.txt', '//../secret.txt', '/%00', '/%zz']) {
      const { status, body } = await ask(path);
      expect([status, body.includes('secret')], path).toEqual([404, false]);
    }
  });

  it('refuses to be written to', async () => {
    expect((await ask('/', 'POST')).status).toBe(405);
  });

  it('moves to the next port when one is taken', async () => {
    const first = Number(new URL(server.url).port);
    const second = await serve(first, join(root, 'dist'));
    expect(Number(new URL(second.url).port)).toBeGreaterThan(first);
    await second.close();
  });
});
