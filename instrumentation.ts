/** Runs once before the first request: a process with missing or weak settings does not start. */
export async function register(): Promise<void> {
  const { env } = await import('@/lib/env');
  try {
    env();
  } catch (error) {
    process.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`);
    process.exit(1);
  }
}
