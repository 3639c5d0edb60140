/** Before the first request: the newest schema, then the demo cellar into an empty database. */
export async function register(): Promise<void> {
  if (process.env.NEXT_RUNTIME !== 'nodejs') return;
  try {
    const { prepare } = await import('./lib/prepare');
    await prepare();
  } catch (error) {
    console.error('Tercet could not start:', error instanceof Error ? error.message : error);
    // Next would stay up and answer 500 to everything.
    process.exit(1);
  }
}
