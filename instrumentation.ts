/** Runs before the first request: a process with missing or weak settings throws here and does not start. */
export async function register(): Promise<void> {
  const { env } = await import('@/lib/env');
  env();
}
