import { createServer, type Server } from 'node:http';
import { readFileSync } from 'node:fs';
import type { AddressInfo } from 'node:net';
import { fileURLToPath } from 'node:url';
import { build } from 'esbuild';
import { chromium, type Browser, type Page } from 'playwright-core';
import { CHROMIUM } from '../../../setup/lib/chromium.mjs';

const path = (relative: string): string => fileURLToPath(new URL(relative, import.meta.url));

const FLAGS = [
  '--no-sandbox',
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
];

/** What a page may load: scripts of its own and WebAssembly, nothing else. */
const POLICY = "default-src 'none'; script-src 'self' 'wasm-unsafe-eval'; worker-src 'self'; connect-src 'self'";

const PAGE = '<!doctype html><meta charset="utf-8"><title>Sandbox</title><script type="module" src="page.js"></script>';

/** A page of Chromium with the sandbox's browser entry as `window.sandboxEntry`. */
export interface BrowserPage {
  readonly page: Page;
  close(): Promise<void>;
}

/** Serves the page from this process and opens it. The bundles must have been built. */
export async function openPage(): Promise<BrowserPage> {
  const server = await serve(await files());
  const { port } = server.address() as AddressInfo;
  const browser: Browser = await chromium.launch({ executablePath: CHROMIUM, args: FLAGS });
  const page = await browser.newPage();
  await page.goto(`http://127.0.0.1:${port}/`);
  await page.waitForFunction('window.sandboxEntry !== undefined');
  const close = async (): Promise<void> => {
    await browser.close();
    await new Promise((resolve) => server.close(resolve));
  };
  return { page, close };
}

async function files(): Promise<Map<string, { type: string; body: string | Buffer }>> {
  const { outputFiles } = await build({
    stdin: {
      contents: "import * as entry from './index.js'; window.sandboxEntry = entry;",
      resolveDir: path('../../src/browser'),
    },
    bundle: true,
    write: false,
    format: 'esm',
    conditions: ['source'],
    logLevel: 'error',
  });
  const script = 'text/javascript; charset=utf-8';
  return new Map([
    ['/', { type: 'text/html; charset=utf-8', body: PAGE }],
    ['/page.js', { type: script, body: outputFiles[0].text }],
    ['/sandbox-worker.js', { type: script, body: readFileSync(path('../../dist/bundle/sandbox-worker.js')) }],
  ]);
}

function serve(contents: Map<string, { type: string; body: string | Buffer }>): Promise<Server> {
  const server = createServer((request, response) => {
    const found = contents.get(request.url ?? '');
    response.writeHead(found ? 200 : 404, {
      'Content-Type': found?.type ?? 'text/plain',
      'Content-Security-Policy': POLICY,
    });
    response.end(found?.body);
  });
  return new Promise((resolve) => {
    server.listen(0, '127.0.0.1', () => resolve(server));
  });
}
