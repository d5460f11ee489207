import path from 'node:path';
import type { Locator } from 'playwright-core';

/** Lets files go over an element as a person dragging them from the desktop does: real events, made by the browser itself. */
export async function dropOnto(target: Locator, files: readonly string[]): Promise<void> {
  const page = target.page();
  await target.scrollIntoViewIfNeeded();
  const box = await target.boundingBox();
  if (!box) throw new Error(`${target} cannot be seen.`);
  const session = await page.context().newCDPSession(page);
  const at = { x: box.x + Math.min(box.width / 2, 60), y: box.y + box.height / 2 };
  const data = { items: [], files: files.map((file) => path.resolve(file)), dragOperationsMask: 1 };
  for (const type of ['dragEnter', 'dragOver', 'drop'] as const)
    await session.send('Input.dispatchDragEvent', { type, ...at, data });
  await session.detach();
}
