/** Runs once in the server's process, before its first request. */
export async function register(): Promise<void> {
  if (process.env.NEXT_RUNTIME !== 'nodejs' || process.env.NEXT_PHASE === 'phase-production-build') return;
  const { markPeers, checkConfiguration } = await import('./app/_server/start-up');
  checkConfiguration();
  markPeers();
}
