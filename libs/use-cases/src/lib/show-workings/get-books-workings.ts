import { type Figure, type Workings, type WorkingsQuery } from '@brakeven/contract';
import { inShopOf, type ShopContext } from '../context';
import { BOOKS_LINE_FIGURES } from './figures';
import { readLineWorkings } from './line-workings';
import { describeNarrowing, refused, splitRequest } from './workings-request';

const PART_WORDS = { overhead: ' that went to overhead', late: ' that came late' } as const;

/**
 * The lines behind a total of the books, over all jobs and what went to overhead, by their days in the books.
 * @throws AppError `invalid_input` (another figure, cursor)
 */
export async function getBooksWorkings(context: ShopContext, query: WorkingsQuery): Promise<Workings> {
  const { ref, paging } = splitRequest(query);
  const { figure, from, to, part } = ref;
  if (!isBooksFigure(figure)) throw refused('figure', 'Only totals of the books can be opened here.');
  const lineFigure = BOOKS_LINE_FIGURES[figure];
  return inShopOf(context, async (trx) => {
    const days = await describeNarrowing(trx, { figure, from, to });
    const title = `${lineFigure.title} in the books${part ? PART_WORDS[part] : ''}${days}`;
    const head = { figure: { figure, part, from, to }, title };
    return readLineWorkings(trx, head, lineFigure, { from, to, part }, paging, context.shop.currency);
  });
}

function isBooksFigure(figure: Figure): figure is keyof typeof BOOKS_LINE_FIGURES {
  return figure.startsWith('books.');
}
