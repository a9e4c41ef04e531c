import { fileURLToPath } from 'node:url';
import type { Page } from '@playwright/test';
import { build } from 'vite';

const here = (path: string) => fileURLToPath(new URL(path, import.meta.url));
let made: Promise<string> | null = null;

/** The stage and its helpers as one script. */
const bundle = async (): Promise<string> => {
  const result = await build({
    configFile: false,
    logLevel: 'error',
    root: here('../..'),
    resolve: { alias: { '@': here('../../src') } },
    build: {
      write: false,
      minify: false,
      lib: { entry: here('../stagePage/stagePage.ts'), formats: ['iife'], name: 'stageParts' },
    },
  });
  const [first] = Array.isArray(result) ? result : [result];
  if (!first || !('output' in first)) throw new Error('The bundler gave nothing.');
  const chunk = first.output.find((part) => part.type === 'chunk');
  if (chunk?.type !== 'chunk') throw new Error('The bundler gave no script.');
  return chunk.code;
};

/** A page with nothing on it but the stage; `files` are answered by path. Its address is never asked for over a network. */
export async function openStagePage(page: Page, files: Readonly<Record<string, Buffer>> = {}): Promise<void> {
  made ??= bundle();
  const code = await made;
  await page.route('http://localhost:1/**', (route) => {
    const path = new URL(route.request().url()).pathname;
    if (path === '/')
      return route.fulfill({
        contentType: 'text/html',
        headers: { 'content-security-policy': "script-src 'self'" },
        body: '<!doctype html><meta charset="utf-8"><style>body{margin:0;background:#000}canvas{display:block}</style><script src="/stage.js"></script><body></body>',
      });
    if (path === '/stage.js') return route.fulfill({ contentType: 'text/javascript', body: code });
    const file = files[path];
    return file ? route.fulfill({ body: file }) : route.fulfill({ status: 404, body: '' });
  });
  await page.goto('http://localhost:1/');
}
