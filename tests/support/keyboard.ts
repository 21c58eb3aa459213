import type { Locator, Page } from 'playwright-core';

const mostStops = 250;

/** A person without a mouse: goes from stop to stop with Tab and acts with the keys, nothing else. */
export class Keys {
  constructor(private readonly page: Page) {
    // From the start: a listener that comes with the key press may come after the chooser.
    page.on('filechooser', (chooser) => void chooser.setFiles(this.files));
  }

  private files: string[] = [];

  press(key: string): Promise<void> {
    return this.page.keyboard.press(key);
  }

  /** Presses Tab until the thing has the focus. Fails when it is not reached in one round of the page. */
  async to(target: Locator): Promise<void> {
    await target.waitFor({ state: 'attached' });
    for (let stop = 0; stop < mostStops; stop += 1) {
      if (await target.evaluate((element) => element === document.activeElement)) return;
      await this.press('Tab');
    }
    throw new Error(`${String(target)} is not reached with Tab`);
  }

  async type(field: Locator, text: string): Promise<void> {
    await this.to(field);
    await this.press('Control+A');
    await this.page.keyboard.type(text);
  }

  /** Presses a button or follows a link. */
  async use(target: Locator): Promise<void> {
    await this.to(target);
    await this.press('Enter');
  }

  async tick(box: Locator): Promise<void> {
    await this.to(box);
    await this.press('Space');
  }

  /** Takes the option of a list whose text holds these words, by going down the list. */
  async choose(list: Locator, words: string): Promise<void> {
    await this.to(list);
    const options = await list.locator('option').allTextContents();
    const wanted = options.findIndex((text) => text.includes(words));
    if (wanted < 0) throw new Error(`no option holds ${words}: ${options.join(' | ')}`);
    const present = await list.evaluate((element) => (element as HTMLSelectElement).selectedIndex);
    for (let step = present; step < wanted; step += 1) await this.press('ArrowDown');
    for (let step = present; step > wanted; step -= 1) await this.press('ArrowUp');
  }

  /** Opens the file chooser of a field and takes a file in it. */
  async take(field: Locator, file: string): Promise<void> {
    this.files = [file];
    await this.to(field);
    await this.press('Space');
  }
}
