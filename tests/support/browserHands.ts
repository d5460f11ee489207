import type { FileChooser, Locator, Page } from 'playwright-core';
import { isAlive, tabTo, typeDay, typeOption } from './browserKeys';

/** The same steps by different hands, so that one journey can be walked with the keyboard and again on a phone. */
export type Hands = {
  /** Follows a link or presses a button. */
  press: (target: Locator) => Promise<void>;
  /** Takes an entry of a menu that has just been opened. */
  pressEntry: (entry: Locator) => Promise<void>;
  write: (field: Locator, text: string) => Promise<void>;
  choose: (list: Locator, option: string) => Promise<void>;
  /** A radio button or a tick. */
  tick: (box: Locator) => Promise<void>;
  day: (field: Locator, day: string) => Promise<void>;
  /** Presses a button that asks for files and gives them. */
  give: (button: Locator, files: string[]) => Promise<void>;
};

async function chooserAfter(page: Page, press: () => Promise<void>): Promise<FileChooser> {
  const [chooser] = await Promise.all([page.waitForEvent('filechooser'), press()]);
  return chooser;
}

/** Nothing but Tab, Enter, Space, arrows and letters. */
export const KEYBOARD: Hands = {
  press: async (target) => {
    await tabTo(target);
    await target.page().keyboard.press('Enter');
  },
  pressEntry: async (entry) => {
    await entry.waitFor();
    const { keyboard } = entry.page();
    for (let steps = 0; steps < 30; steps += 1) {
      if (await entry.evaluate((element) => element === document.activeElement)) return keyboard.press('Enter');
      await keyboard.press('ArrowDown');
    }
    throw new Error(`The arrow keys never reached ${entry}.`);
  },
  write: async (field, text) => {
    await tabTo(field);
    await field.page().keyboard.press('Control+A');
    await field.page().keyboard.type(text);
  },
  choose: async (list, option) => {
    await tabTo(list);
    await typeOption(list, option);
  },
  tick: async (box) => {
    // One stop for a group of radio buttons, on the one that is chosen; arrows go on from there.
    await box.evaluate((element) => {
      const isRadio = element instanceof HTMLInputElement && element.type === 'radio';
      const group = isRadio ? [...(element.form?.querySelectorAll<HTMLInputElement>('input:checked') ?? [])] : [];
      const chosen = group.find((one) => isRadio && one.name === element.name);
      (chosen ?? element).setAttribute('data-tab-stop', '');
    });
    const { keyboard } = box.page();
    const stop = box.page().locator('[data-tab-stop]');
    await tabTo(stop);
    await stop.evaluate((element) => element.removeAttribute('data-tab-stop'));
    if (await box.evaluate((element) => element === document.activeElement)) await keyboard.press('Space');
    for (let steps = 0; steps < 12 && !(await box.isChecked()); steps += 1) await keyboard.press('ArrowDown');
  },
  day: async (field, day) => {
    await tabTo(field);
    await typeDay(field.page(), day);
  },
  give: async (button, files) => {
    await tabTo(button);
    const chooser = await chooserAfter(button.page(), () => button.page().keyboard.press('Enter'));
    await chooser.setFiles(files);
  },
};

/** A finger on a phone. */
export const TOUCH: Hands = {
  press: async (target) => {
    await isAlive(target);
    await target.tap();
  },
  pressEntry: (entry) => entry.tap(),
  write: async (field, text) => {
    await isAlive(field);
    await field.tap();
    await field.fill(text);
  },
  choose: async (list, option) => {
    await isAlive(list);
    await list.selectOption({ label: option });
  },
  tick: async (box) => {
    await isAlive(box);
    await box.tap();
  },
  day: async (field, day) => {
    await isAlive(field);
    await field.fill(day);
  },
  give: async (button, files) => {
    await isAlive(button);
    const chooser = await chooserAfter(button.page(), () => button.tap());
    await chooser.setFiles(files);
  },
};
