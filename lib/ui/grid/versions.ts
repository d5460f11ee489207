/**
 * Own saves move a row's version on. An edit that began on version 3 while another cell of the row was being saved to
 * version 4 by the same person is not a conflict; it follows the own step.
 */
export class OwnVersions {
  private readonly steps = new Map<string, number>();

  saved(rowId: string, from: number | null, to: number | undefined): void {
    if (from === null || to === undefined || to === from) return;
    this.steps.set(`${rowId}\u0000${from}`, to);
  }

  follow(rowId: string, version: number | null): number | null {
    let at = version;
    while (at !== null) {
      const next = this.steps.get(`${rowId}\u0000${at}`);
      if (next === undefined) return at;
      at = next;
    }
    return at;
  }
}
