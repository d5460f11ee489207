import { maskPage } from './maskPage';
import type { FromMaskChild, ToMaskChild } from './messages';

/** Child process that draws one page and ends. It has no environment, no database and no store. */
process.on('disconnect', () => process.exit(1));
process.once('message', (message: ToMaskChild) => {
  maskPage(message).then(
    (answer) => process.send?.({ type: 'done', answer } satisfies FromMaskChild, () => process.exit(0)),
    () => process.exit(1),
  );
});
process.send?.({ type: 'ready' } satisfies FromMaskChild);
