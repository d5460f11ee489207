import { confine } from '@/lib/jobs/readFile/confine';
import type { ToChild } from '@/lib/jobs/readFile/messages';
import { readBytes } from '@/lib/jobs/readFile/readBytes';

/** The reading process, but for one file after the other: thousands can be tried without a start for each. */
confine();
const nothing = () => undefined;
process.on('disconnect', () => process.exit(1));
process.on('message', (message: ToChild) => {
  readBytes(message, { page: nothing, scans: nothing }).then(
    (reading) => process.send?.({ reading }),
    (error: unknown) =>
      process.send?.({ threw: error instanceof Error ? `${error.name}: ${error.message}` : 'unknown' }),
  );
});
process.send?.({ ready: true });
