/** Next compiles this for a runtime without `process` too, and warns of the plain word; here it is always there. */
const running = globalThis as { process?: { stderr: { write(text: string): void }; exit(code: number): never } };

/** Runs before the first request. Next would log a refusal and serve on; a process with missing or weak settings must not. */
export async function register(): Promise<void> {
  try {
    const { env } = await import('@/lib/env');
    env();
  } catch (error) {
    running.process?.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`);
    running.process?.exit(1);
    throw error;
  }
}
