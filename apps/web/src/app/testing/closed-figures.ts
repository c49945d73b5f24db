/** Money or hours as they are written on pages: '$1,204.00', '−$12.00', '78.00 h'. */
const FIGURE = /[−-]?[$€£]\s?[\d,]+(\.\d+)?|\b\d[\d,]*\.\d+\s?h\b/;

/**
 * The amounts of money and hours on a page that do not open: neither a button that shows workings nor a link to where
 * the number was entered. `words` selects sentences that explain figures which open beside them.
 */
export function findClosedFigures(page: HTMLElement, words?: string): string[] {
  const opening = ['button.figure', 'a[href]', ...(words ? [words] : [])].join(', ');
  const texts = document.createTreeWalker(page, NodeFilter.SHOW_TEXT);
  const closed: string[] = [];
  for (let node = texts.nextNode(); node; node = texts.nextNode()) {
    const text = node.textContent ?? '';
    if (FIGURE.test(text) && !node.parentElement?.closest(opening)) closed.push(text.trim());
  }
  return closed;
}
