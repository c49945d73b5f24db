import { type FigureRef } from '@brakeven/contract';
import { isPlainClick } from '../link-click';
import { type Tone } from '../states/status-tag';
import { type GridAction, type GridNote } from './grid-column';

/** What a cell shows and does, ready to be drawn. */
export interface CellContent {
  text: string;
  /** Column's name, read out before a figure. */
  label: string;
  figure?: FigureRef | null;
  href?: string | null;
  tone?: Tone | null;
  isLoss?: boolean;
  note?: GridNote | null;
  actions?: readonly GridAction[];
}

export interface CellHandlers {
  openWorkings: (ref: FigureRef) => void;
  followLink: (href: string) => void;
}

/**
 * Draws a cell as plain elements: thousands of cells scroll by, and a component for each would cost more than it shows.
 * What can be pressed carries `data-press`, so that Enter on the cell presses it.
 */
export function toCellElement(content: CellContent, handlers: CellHandlers): HTMLElement {
  const cell = document.createElement('span');
  cell.className = content.isLoss ? 'cell loss' : 'cell';
  if (content.actions) {
    cell.append(...content.actions.map(toActionButton));
    return cell;
  }
  if (content.text !== '') cell.append(toMainElement(content, handlers));
  if (content.note) cell.append(toNoteElement(content.note));
  return cell;
}

function toMainElement(content: CellContent, handlers: CellHandlers): HTMLElement {
  const { figure, href } = content;
  if (figure) return toFigureButton(content, () => handlers.openWorkings(figure));
  if (href) return toLink(content.text, href, handlers.followLink);
  const span = document.createElement('span');
  span.textContent = content.text;
  if (content.tone) {
    span.className = 'tag';
    span.dataset['tone'] = content.tone;
  }
  return span;
}

function toFigureButton({ text, label }: CellContent, open: () => void): HTMLElement {
  const button = toButton(text, open);
  button.className = 'figure';
  button.setAttribute('aria-haspopup', 'dialog');
  button.setAttribute('aria-label', `${label}: ${text}`);
  return button;
}

function toActionButton({ label, run }: GridAction): HTMLElement {
  const button = toButton(label, run);
  button.className = 'action';
  return button;
}

function toButton(text: string, press: () => void): HTMLButtonElement {
  const button = document.createElement('button');
  button.type = 'button';
  button.tabIndex = -1;
  button.dataset['press'] = '';
  button.textContent = text;
  button.addEventListener('click', press);
  return button;
}

function toLink(text: string, href: string, follow: (href: string) => void): HTMLElement {
  const link = document.createElement('a');
  link.href = href;
  link.tabIndex = -1;
  link.dataset['press'] = '';
  link.textContent = text;
  link.addEventListener('click', (event) => {
    if (!isPlainClick(event)) return;
    event.preventDefault();
    follow(href);
  });
  return link;
}

function toNoteElement({ text, severity }: GridNote): HTMLElement {
  const note = document.createElement('span');
  note.className = `note ${severity}`;
  note.textContent = `${NOTE_SIGNS[severity]}${text}`;
  note.title = text;
  return note;
}

const NOTE_SIGNS: Readonly<Record<GridNote['severity'], string>> = {
  refused: '✕ ',
  warning: '! ',
  quiet: '',
};
