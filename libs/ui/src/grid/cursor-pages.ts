import { firstValueFrom } from 'rxjs';
import { type GridOrder } from './grid-column';
import { type PageSource, toPageRequest } from './page-source';

export interface Block<T> {
  rows: readonly T[];
  /** How many rows there are in all, once the end has been seen. */
  rowCount: number | undefined;
}

/**
 * Serves a grid's numbered blocks from pages that only know their next one: the cursor of a block is what the block
 * before answered, so a block that is asked for out of turn has those before it loaded first.
 */
export class CursorPages<T> {
  private readonly cursors: (string | undefined)[] = [undefined];
  private rowCount: number | undefined;

  constructor(
    private readonly source: PageSource<T>,
    private readonly order: GridOrder | undefined,
    private readonly blockSize: number,
  ) {}

  async load(block: number): Promise<Block<T>> {
    while (this.cursors.length <= block && this.rowCount === undefined) {
      await this.loadPage(this.cursors.length - 1);
    }
    if (block >= this.cursors.length) return { rows: [], rowCount: this.rowCount };
    const rows = await this.loadPage(block);
    return { rows, rowCount: this.rowCount };
  }

  private async loadPage(block: number): Promise<readonly T[]> {
    const request = toPageRequest(this.cursors[block], this.order, this.blockSize);
    const { items, nextCursor } = await firstValueFrom(this.source.load(request));
    if (nextCursor === null) this.rowCount = block * this.blockSize + items.length;
    else this.cursors[block + 1] = nextCursor;
    return items;
  }
}
