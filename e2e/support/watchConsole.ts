import { expect, type Page } from '@playwright/test';

/** What a page may print without being wrong. */
const allowed = [
  // The software renderer's remark on reading pixels back; a graphics card doesn't make it.
  /GPU stall due to ReadPixels/,
  /READ-usage buffer/,
  // A request that a story makes fail on purpose, or a server that it kills: the page's own words are what is looked at.
  /^Failed to load resource/,
  /WebSocket connection to .* failed/,
];

/**
 * Collects what a page prints as error and what it throws.
 * @returns call it at the end: it fails the test when there was any
 */
export function watchConsole(page: Page): () => void {
  const said: string[] = [];
  page.on('console', (message) => {
    if (message.type() !== 'error') return;
    if (!allowed.some((pattern) => pattern.test(message.text()))) said.push(message.text());
  });
  page.on('pageerror', (error) => said.push(String(error)));
  return () => expect(said, 'errors in the browser’s console').toEqual([]);
}
