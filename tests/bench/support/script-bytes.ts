import type { Page } from '@playwright/test';

/**
 * The bytes of script that a page takes over the network, as they came (compressed, with their headers), from the
 * first request until nothing is under way any more.
 */
export async function scriptBytes(page: Page, open: () => Promise<unknown>): Promise<number> {
  const session = await page.context().newCDPSession(page);
  await session.send('Network.enable');
  const scripts = new Set<string>();
  let bytes = 0;
  session.on('Network.responseReceived', ({ requestId, type }) => {
    if (type === 'Script') scripts.add(requestId);
  });
  session.on('Network.loadingFinished', ({ requestId, encodedDataLength }) => {
    if (scripts.has(requestId)) bytes += encodedDataLength;
  });
  await open();
  await page.waitForLoadState('networkidle');
  await session.detach();
  return bytes;
}
