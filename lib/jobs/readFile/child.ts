import { confine } from './confine';
import { type FromChild, isDataKind, type ToChild } from './messages';
import type { Told } from './pictures';
import { readBytes } from './readBytes';
import { rowsOfSheet } from './sheetRows';

/** Child process that reads one file and ends. It has no environment, no database and no store. */
function send(message: FromChild) {
  process.send?.(message);
}

const tell: Told = {
  page: (page, of) => send({ type: 'page', page, of }),
  scans: (pages) => send({ type: 'scans', pages }),
};

async function answer(input: ToChild): Promise<FromChild> {
  if (input.rowsOnly && isDataKind(input.kind)) {
    return { type: 'rows', rows: await rowsOfSheet({ kind: input.kind, bytes: input.bytes }) };
  }
  return { type: 'done', reading: await readBytes(input, tell) };
}

confine();
process.on('disconnect', () => process.exit(1));
process.once('message', (message: ToChild) => {
  answer(message).then(
    (said) => process.send?.(said, () => process.exit(0)),
    () => process.exit(1),
  );
});
send({ type: 'ready' });
