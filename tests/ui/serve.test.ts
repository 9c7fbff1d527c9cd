// The server of the page, on a folder of its own. Costs nothing.
import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { request, type IncomingMessage, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';

import { afterAll, beforeAll, describe, expect, test } from 'vitest';

import { createPageServer } from '../../sim/cli/page-server.ts';

let folder: string;
let server: Server;
beforeAll(async () => {
  folder = mkdtempSync(join(tmpdir(), 'bedwave-page-'));
  mkdirSync(join(folder, 'page/assets'), { recursive: true });
  writeFileSync(join(folder, 'page/index.html'), '<!doctype html>');
  writeFileSync(join(folder, 'page/assets/a-1.js'), 'export {}');
  writeFileSync(join(folder, 'secret.txt'), 'not for you');
  server = createPageServer(join(folder, 'page'), () => ({ name: 'my.json', text: '{}' }));
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
});
afterAll(() => {
  server.close();
  rmSync(folder, { recursive: true });
});

/** Asks as any program could: a path is sent as it is written. */
function ask(
  path: string,
  { host, method = 'GET' }: { host?: string; method?: string } = {},
): Promise<{ answer: IncomingMessage; text: string }> {
  const { port } = server.address() as AddressInfo;
  return new Promise((resolve, reject) => {
    request({ host: '127.0.0.1', port, path, method, headers: { host: host ?? `127.0.0.1:${port}` } }, (answer) => {
      let text = '';
      answer.on('data', (part: Buffer) => (text += part.toString()));
      answer.on('end', () => resolve({ answer, text }));
    })
      .on('error', reject)
      .end();
  });
}

describe('the page server', () => {
  test('gives the page under headers that let nothing in or out', async () => {
    const { answer, text } = await ask('/');
    expect([answer.statusCode, text]).toEqual([200, '<!doctype html>']);
    const policy = answer.headers['content-security-policy'] ?? '';
    expect(policy).toContain("default-src 'self'");
    expect(policy).toContain("frame-ancestors 'none'");
    expect(policy).not.toContain('unsafe-eval');
    expect(answer.headers['x-content-type-options']).toBe('nosniff');
    expect(answer.headers['cache-control']).toBe('no-cache');
    expect((await ask('/assets/a-1.js')).answer.headers['cache-control']).toContain('immutable');
  });

  test.each([
    '/../secret.txt',
    '/%2e%2e/secret.txt',
    '/assets/../../secret.txt',
    '/assets',
    '//secret.txt',
    '/case.json/x',
  ])('has nothing at %s', async (path) => {
    const { answer, text } = await ask(path);
    expect([answer.statusCode, text]).toEqual([404, '404\n']);
  });

  test('turns away a page that comes under another name, and anything but reading', async () => {
    expect((await ask('/', { host: 'evil.example' })).answer.statusCode).toBe(403);
    expect((await ask('/', { method: 'POST' })).answer.statusCode).toBe(405);
  });

  test('gives the case that was named, anew each time', async () => {
    const { answer, text } = await ask('/case.json');
    expect(JSON.parse(text)).toEqual({ name: 'my.json', text: '{}' });
    expect(answer.headers['cache-control']).toBe('no-store');
  });
});
