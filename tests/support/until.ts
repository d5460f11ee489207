const BETWEEN_LOOKS_MS = 50;

/** Looks until the state is there, and fails with the last one seen when it does not come in time. */
export async function until<T>(
  what: string,
  look: () => Promise<T> | T,
  isThere: (seen: T) => boolean,
  withinMs = 40_000,
): Promise<T> {
  const deadline = Date.now() + withinMs;
  for (;;) {
    const seen = await look();
    if (isThere(seen)) return seen;
    if (Date.now() > deadline)
      throw new Error(`Not within ${withinMs} ms: ${what}. Last seen: ${JSON.stringify(seen)}`);
    await new Promise((resolve) => setTimeout(resolve, BETWEEN_LOOKS_MS));
  }
}
