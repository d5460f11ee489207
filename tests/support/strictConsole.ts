import { afterEach, beforeEach, vi } from 'vitest';

/** A test that makes the program complain on console.error fails, unless it listens for that itself. */
beforeEach((context) => {
  const complaints = vi.spyOn(console, 'error').mockImplementation(() => undefined);
  context.onTestFinished(() => complaints.mockRestore());
});

afterEach(() => {
  if (!vi.isMockFunction(console.error)) return;
  const [first] = vi.mocked(console.error).mock.calls;
  vi.mocked(console.error).mockClear();
  if (first !== undefined) throw new Error(`console.error was called: ${first.map(String).join(' ')}`);
});
