import { mkdir, mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import express from 'express';
import request from 'supertest';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { serveWeb } from './web';

let scratch: string;
const app = express();
beforeAll(async () => {
  scratch = await mkdtemp(path.join(tmpdir(), 'clamptide-web-'));
  // Checkouts stand below folders such as ~/.local/share.
  const folder = path.join(scratch, '.local', 'web');
  await mkdir(folder, { recursive: true });
  await writeFile(path.join(folder, 'index.html'), '<!doctype html><title>Clamptide</title>');
  serveWeb(app, folder);
});
afterAll(() => rm(scratch, { recursive: true, force: true }));

it('serves the page at every address, also from below a folder whose name has a dot', async () => {
  for (const address of ['/', '/floor', '/orders/OR-7']) {
    const page = await request(app).get(address).set('Accept', 'text/html');
    expect(page.status).toBe(200);
    expect(page.text).toContain('Clamptide');
    expect(page.headers['cache-control']).toBe('no-cache');
  }
  expect((await request(app).get('/missing.js')).status).toBe(404);
});
