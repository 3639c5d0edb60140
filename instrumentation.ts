/**
 * Runs once before the first request: checks the settings, brings the database to the newest
 * schema, fills the demo. A server that failed at it must not stay up answering errors.
 */
export async function register(): Promise<void> {
  if (process.env.NEXT_RUNTIME !== 'nodejs') return;
  const { startUp } = await import('@/lib/setup/start-up');
  await startUp();
}
