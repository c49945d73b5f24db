import { of, throwError } from 'rxjs';
import { CursorPages } from './cursor-pages';
import { type CursorPage, type PageRequest, type PageSource } from './page-source';

/** Five rows in pages of two, as a server with cursors would serve them. */
class FiveRows implements PageSource<number> {
  readonly asked: (string | undefined)[] = [];

  load({ cursor, limit }: PageRequest) {
    this.asked.push(cursor);
    const from = Number(cursor ?? 0);
    const items = [1, 2, 3, 4, 5].slice(from, from + limit);
    const next = from + limit;
    return of<CursorPage<number>>({ items, nextCursor: next < 5 ? String(next) : null });
  }
}

describe('CursorPages', () => {
  it('serves blocks in order and knows the end when it sees it', async () => {
    const pages = new CursorPages(new FiveRows(), undefined, 2);
    expect(await pages.load(0)).toEqual({ rows: [1, 2], rowCount: undefined });
    expect(await pages.load(1)).toEqual({ rows: [3, 4], rowCount: undefined });
    expect(await pages.load(2)).toEqual({ rows: [5], rowCount: 5 });
  });

  it('loads what stands before a block that is asked for out of turn', async () => {
    const source = new FiveRows();
    const pages = new CursorPages(source, undefined, 2);
    expect(await pages.load(2)).toEqual({ rows: [5], rowCount: 5 });
    expect(source.asked).toEqual([undefined, '2', '4']);
  });

  it('answers nothing beyond the end', async () => {
    const pages = new CursorPages(new FiveRows(), undefined, 2);
    expect(await pages.load(7)).toEqual({ rows: [], rowCount: 5 });
  });

  it('passes the order on', async () => {
    const requests: PageRequest[] = [];
    const source: PageSource<number> = {
      load: (request) => {
        requests.push(request);
        return of({ items: [], nextCursor: null });
      },
    };
    await new CursorPages(source, { sort: 'hours', direction: 'desc' }, 50).load(0);
    expect(requests).toEqual([{ cursor: undefined, sort: 'hours', direction: 'desc', limit: 50 }]);
  });

  it('can be asked again after a failure', async () => {
    let isDown = true;
    const rows = new FiveRows();
    const source: PageSource<number> = {
      load: (request) => (isDown ? throwError(() => new Error('down')) : rows.load(request)),
    };
    const pages = new CursorPages(source, undefined, 2);
    await expect(pages.load(0)).rejects.toThrow('down');
    isDown = false;
    expect((await pages.load(0)).rows).toEqual([1, 2]);
  });
});
