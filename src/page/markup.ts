/** Markup from templates in which everything put in is text, unless it is markup already. */
import { visibleText } from '../charts/visible-text.ts';

/** Text that is markup. */
export class Markup {
  readonly text: string;
  constructor(text: string) {
    this.text = text;
  }
}

/** What a template takes: text and numbers are escaped, lists follow one another, null and false leave nothing. */
export type Piece = Markup | string | number | null | false | readonly Piece[];

/** A template of markup: html`<p>${studyText}</p>` is safe whatever the text holds. */
export function html(parts: TemplateStringsArray, ...pieces: readonly Piece[]): Markup {
  return new Markup(parts.map((part, index) => part + (index < pieces.length ? markupOf(pieces[index] as Piece) : '')).join(''));
}

function markupOf(piece: Piece): string {
  if (piece === null || piece === false) return '';
  if (piece instanceof Markup) return piece.text;
  if (Array.isArray(piece)) return piece.map(markupOf).join('');
  return escapeText(String(piece));
}

const entities: Readonly<Record<string, string>> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;', "'": '&#39;' };

/** Text as markup shows it, hidden characters by their code; safe between tags and in quoted attributes. */
export function escapeText(text: string): string {
  return visibleText(text).replace(/[&<>"']/gu, (character) => entities[character] as string);
}

/** Data as the text of a script element: nothing in it can end the element, open a comment, or turn the direction of the source. */
export function embeddedJson(data: unknown): string {
  return JSON.stringify(data).replace(/[<>&\u007f-\u009f\u061c\u200b-\u200f\u2028-\u202f\u2060-\u206f\ufeff]/gu, (character) => {
    return `\\u${character.charCodeAt(0).toString(16).padStart(4, '0')}`;
  });
}
